using Looseloop.Link;
using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>Requests and answers, one after another: repeated where a line was lost, halted where the user cancels or the box is silent.</summary>
internal sealed class BoxExchange(LineChannel channel, BoardClock clock)
{
    /// <summary>How often a request is sent before the box counts as silent.</summary>
    public const int Tries = 3;

    private static readonly TimeSpan _answerTime = TimeSpan.FromSeconds(1);
    private static readonly TimeSpan _quietTime = TimeSpan.FromMilliseconds(700);
    private static readonly TimeSpan _haltTime = TimeSpan.FromMilliseconds(500);

    public BoxLineCounters Counters => channel.Counters;

    /// <summary>Sends a request whose answers are waited for by <see cref="Next"/>.</summary>
    public void Send(string verb, params ReadOnlySpan<long> fields) => channel.Send(verb, fields);

    /// <summary>Sends a request that changes nothing when it is repeated, and waits for its one answer.</summary>
    public T Ask<T>(string verb, params ReadOnlySpan<long> fields)
        where T : BoxMessage
    {
        channel.Send(verb, fields);
        for (int tries = 1; ; tries++)
        {
            long asked = channel.Now;
            bool garbled = false;
            while (!garbled && channel.Since(asked) < _answerTime && channel.Receive(_answerTime - channel.Since(asked)) is BoxMessage message)
            {
                switch (message)
                {
                    case T answer:
                        return answer;
                    case FaultAnswer { Code: FaultCode.UnreadableLine or FaultCode.LineTooLong }:
                        garbled = true;
                        break;
                    case FaultAnswer fault:
                        throw new BoxException(fault.Code);
                }
            }

            if (tries == Tries)
            {
                throw new BoxException(BoxTrouble.FellSilent, $"The box on {channel.Link.Name} no longer answers. Check its power and cable, then try again.");
            }

            Counters.Repeated++;
            channel.Resend();
        }
    }

    /// <summary>The next message of work that goes on; a fault is thrown.</summary>
    public BoxMessage Next(CancellationToken cancel)
    {
        BoxMessage message = NextOrFault(cancel);
        return message is FaultAnswer fault ? throw new BoxException(fault.Code) : message;
    }

    /// <summary>The next message of work that goes on.</summary>
    public BoxMessage NextOrFault(CancellationToken cancel)
    {
        if (cancel.IsCancellationRequested)
        {
            Halt();
            cancel.ThrowIfCancellationRequested();
        }

        BoxMessage? message = channel.Receive(_quietTime, keepAwake: true);
        if (message is null)
        {
            Halt();
            throw new BoxException(
                BoxTrouble.FellSilent,
                $"The box on {channel.Link.Name} fell silent in the middle of its work; its drive stops by itself. Check its power and cable, then read again.");
        }

        if (message is AliveAnswer alive)
        {
            clock.See(alive.TimeUs);
        }

        return message;
    }

    /// <summary>Stops whatever the box is doing. Never throws for a box that does not answer: its own silence stop will act.</summary>
    public void Halt()
    {
        try
        {
            channel.Send(Verb.Halt);
            long begun = channel.Now;
            while (channel.Since(begun) < _haltTime && channel.Receive(_haltTime) is BoxMessage message && message is not HaltedAnswer)
            {
            }
        }
        catch (LinkLostException)
        {
            // Gone already; the box stops by itself.
        }
    }

    /// <summary>The level in an answer, its times seen.</summary>
    public DarkLevel Level(DarkAnswer dark)
    {
        clock.See(dark.FromUs);
        clock.See(dark.ToUs);
        return new DarkLevel(dark.Channel, dark.Samples, dark.Sum, dark.SumSquares, dark.Min, dark.Max, dark.FromUs, dark.ToUs);
    }
}
