using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>Work with the drive on, once it has been asked for: the look before it, what it measures, and how it ended.</summary>
internal sealed class DrivenWork(BoxExchange exchange, BoardClock clock, HeldPlan plan)
{
    /// <summary>Goes along with it to its end.</summary>
    /// <param name="measured">Told every message between the look and the end.</param>
    /// <param name="cancel">Halts the box.</param>
    /// <returns>The dark level of the look before it.</returns>
    /// <exception cref="BoxException">It was refused, or ended by a fault.</exception>
    public DarkLevel Follow(Action<BoxMessage> measured, CancellationToken cancel)
    {
        DarkLevel look = default;
        int fault = FaultCode.None;
        while (true)
        {
            switch (exchange.NextOrFault(cancel))
            {
                case DarkAnswer dark:
                    look = exchange.Level(dark);
                    break;
                case FaultAnswer answer:
                    fault = FaultOrThrow(answer, begun: look.Samples > 0);
                    break;
                case DoneAnswer done:
                    clock.See(done.TimeUs);
                    return fault != FaultCode.None || done.Ending == Ending.Faulted
                        ? throw new BoxException(fault != FaultCode.None ? fault : done.FaultCode)
                        : look;
                case var message:
                    measured(message);
                    break;
            }
        }
    }

    /// <summary>A refusal ends the request here; a fault of work already begun is followed by <c>done</c>.</summary>
    private int FaultOrThrow(FaultAnswer fault, bool begun)
    {
        bool refusedByLook = fault.Code is FaultCode.FieldPresent or FaultCode.PickupBelowRange;
        if (fault.Code == FaultCode.PlanEmpty)
        {
            plan.Forget();
        }

        return begun || refusedByLook ? fault.Code : throw new BoxException(fault.Code);
    }
}
