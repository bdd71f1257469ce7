using Looseloop.Protocol;
using Looseloop.Readings;

namespace Looseloop.Box;

/// <summary>Finds out who is at the other end of a link.</summary>
internal static class BoxGreeting
{
    private static readonly TimeSpan _answerTime = TimeSpan.FromSeconds(1);

    /// <summary>Asks until a box identifies itself, or patience is at its end.</summary>
    /// <exception cref="BoxException">Nothing answers, or something else does.</exception>
    public static BoxIdentity Exchange(LineChannel channel, TimeSpan patience, CancellationToken cancel)
    {
        channel.Clear();
        long begun = channel.Now;
        do
        {
            cancel.ThrowIfCancellationRequested();
            channel.Send(Verb.Identify);
            long asked = channel.Now;
            while (channel.Since(asked) < _answerTime && channel.Receive(_answerTime - channel.Since(asked)) is BoxMessage message)
            {
                if (message is BoxAnswer answer)
                {
                    return Identify(channel.Link.Name, answer);
                }
            }

            // A box that was left in mid-sweep answers nothing else until it is halted.
            channel.Send(Verb.Halt);
            channel.Receive(TimeSpan.FromMilliseconds(100));
        }
        while (channel.Since(begun) < patience);

        string heard = channel.Counters.Lines > 0
            ? "something else is talking on that port"
            : "nothing came back";
        throw new BoxException(
            BoxTrouble.NoAnswer,
            $"No box answers on {channel.Link.Name}: {heard}. Check that this is the box's port, that its firmware is deployed, and that it has power.");
    }

    private static BoxIdentity Identify(string port, BoxAnswer answer) =>
        answer.ProtocolVersion == ProtocolVersion.Current
            ? new BoxIdentity(
                port, answer.Board, $"{answer.Major}.{answer.Minor}.{answer.Patch}", answer.ProtocolVersion, answer.BootId,
                answer.MostDutyBits, answer.LowestHz, answer.HighestHz, answer.FullCounts, answer.Inputs)
            : throw new BoxException(
                BoxTrouble.OtherProtocol,
                $"The box on {port} speaks version {answer.ProtocolVersion} of the protocol, this program version {ProtocolVersion.Current}. "
                + "Deploy the firmware that came with this program.");
}
