#nullable enable
using System.Collections.Generic;

namespace Looseloop.Protocol;

/// <summary>Turns the box's lines into messages. What does not parse to the last field is refused whole.</summary>
public sealed class BoxLineParser
{
    private const long AnyTime = 999_999_999_999_999_999;

    private readonly LineReader _reader = new();

    /// <summary>Reads one line without its newline.</summary>
    /// <param name="line">The bytes.</param>
    /// <param name="count">How many of them.</param>
    /// <param name="lineNumber">The box's own count of its lines.</param>
    /// <param name="requestNumber">The request it answers, 0 for none.</param>
    /// <returns>The message, or null if the line is damaged or not of this protocol.</returns>
    public BoxMessage? Parse(byte[] line, int count, out int lineNumber, out int requestNumber)
    {
        lineNumber = 0;
        requestNumber = 0;
        if (!_reader.Open(line, count, LineWriter.BoxMark)
            || !_reader.TryNumber(0, WireLimits.LastLineNumber, out long number)
            || !_reader.TryNumber(0, WireLimits.LastRequestNumber, out long request)
            || !_reader.TryWord())
        {
            return null;
        }

        lineNumber = (int)number;
        requestNumber = (int)request;
        var fields = new Fields(_reader);
        BoxMessage? message = Read(fields);
        return fields.AllRead ? message : null;
    }

    private BoxMessage? Read(Fields fields) => _reader.WordText() switch
    {
        Answer.Box => new BoxAnswer(
            fields.Int(), fields.Int(), fields.Int(), fields.Int(), fields.Text(), fields.Long(), fields.Long(), fields.Int(),
            fields.Int(), fields.Int(), fields.Int(), fields.Int(), fields.Int(), fields.Int(), fields.Int()),
        Answer.Limits => new LimitsAnswer(fields.Int(), fields.Int(), fields.Int(), fields.Int()),
        Answer.Dark => new DarkAnswer(
            fields.Int(), fields.Int(), fields.Long(), fields.Long(), fields.Int(), fields.Int(), fields.Long(), fields.Long()),
        Answer.Planned => new PlannedAnswer(fields.Int()),
        Answer.Point => new PointAnswer(
            fields.Int(), fields.Int(), fields.Int(), fields.Int(), fields.Int(), fields.Long(), fields.Long(), fields.Int(),
            fields.Int(), fields.Long()),
        Answer.Pack => ReadPack(fields),
        Answer.Decay => ReadDecay(fields),
        Answer.Alive => new AliveAnswer(fields.Long()),
        Answer.Done => new DoneAnswer(fields.Int(), fields.Int(), fields.Int(), fields.Long()),
        Answer.Halted => new HaltedAnswer(fields.Long()),
        Answer.Fault => new FaultAnswer(fields.Int(), fields.Text()),
        _ => null,
    };

    private static PackAnswer ReadPack(Fields fields)
    {
        int index = fields.Int();
        int samples = fields.Int();
        long first = fields.Long();
        long last = fields.Long();
        var sums = new List<long>();
        var mins = new List<int>();
        var maxs = new List<int>();
        while (fields.More)
        {
            sums.Add(fields.Long());
            mins.Add(fields.Int());
            maxs.Add(fields.Int());
        }

        return new PackAnswer(index, samples, first, last, sums.ToArray(), mins.ToArray(), maxs.ToArray());
    }

    private static DecayAnswer ReadDecay(Fields fields)
    {
        int repeat = fields.Int();
        var times = new List<long>();
        var counts = new List<int>();
        while (fields.More)
        {
            times.Add(fields.Long());
            counts.Add(fields.Int());
        }

        return new DecayAnswer(repeat, times.ToArray(), counts.ToArray());
    }

    /// <summary>Takes fields in turn and remembers whether one was missing or malformed.</summary>
    private sealed class Fields(LineReader reader)
    {
        private bool _broken;

        public bool More => !_broken && reader.More;

        public bool AllRead => !_broken && !reader.More;

        public long Long()
        {
            if (!reader.TryNumber(0, AnyTime, out long value))
            {
                _broken = true;
            }

            return value;
        }

        public int Int()
        {
            if (!reader.TryNumber(0, int.MaxValue, out long value))
            {
                _broken = true;
            }

            return (int)value;
        }

        public string Text()
        {
            if (!reader.TryWord())
            {
                _broken = true;
                return "";
            }

            return reader.WordText();
        }
    }
}
