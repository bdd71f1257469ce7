using Looseloop.Protocol;

namespace Looseloop.Box;

/// <summary>A host that dies in the middle of a sweep, played: whether the box stops by itself.</summary>
internal sealed class SilenceTrial(LineChannel channel, BoxExchange exchange, BoardClock clock, HeldPlan plan)
{
    /// <summary>Begins a sweep, waits until it drives, and then says nothing.</summary>
    public SilenceResult Run(SweepRequest request, TimeSpan longest, CancellationToken cancel)
    {
        plan.Set(request.Settings);
        exchange.Send(
            Verb.Sweep, request.DwellUs, request.Samples, request.SpacingUs, SweepOrder.AsPlanned, request.Pack, request.Channel);
        BoxMessage? message;
        while ((message = exchange.NextOrFault(cancel)) is not (PointAnswer or PackAnswer))
        {
            if (message is FaultAnswer refusal)
            {
                throw new BoxException(refusal.Code);
            }
        }

        // The first point proves that it drives. From here on only this side's last line counts.
        int fault = FaultCode.None;
        while (channel.SinceSent < longest)
        {
            if (cancel.IsCancellationRequested)
            {
                exchange.Halt();
                cancel.ThrowIfCancellationRequested();
            }

            message = channel.Receive(longest - channel.SinceSent);
            if (message is FaultAnswer answer)
            {
                fault = answer.Code;
            }
            else if (message is DoneAnswer done)
            {
                clock.See(done.TimeUs);
                return new SilenceResult(true, fault != FaultCode.None ? fault : done.FaultCode, channel.SinceSent);
            }
        }

        exchange.Halt();
        return new SilenceResult(false, fault, longest);
    }
}
