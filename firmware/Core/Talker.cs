using System;
using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Everything the box says, one method a word, in one buffer.</summary>
    internal sealed class Talker
    {
        // Less than the 50 ms that are promised: a write may return one tick of the scheduler (10 ms) after its last byte has
        // gone, and the clock is looked at only between pieces of work.
        private const long AliveUs = (WireLimits.AliveMs - 20) * 1000L;

        private readonly LineWriter _writer = new LineWriter(WireLimits.BoxLineBytes);
        private readonly ILink _link;
        private readonly SteadyClock _clock;
        private int _lineNumber;
        private long _lastUs;

        public Talker(ILink link, SteadyClock clock)
        {
            _link = link;
            _clock = clock;
        }

        /// <summary>When the box must say something again while it works.</summary>
        public long AliveDueUs
        {
            get { return _lastUs + AliveUs; }
        }

        public long LastUs
        {
            get { return _lastUs; }
        }

        public void Box(int request, BoxProfile profile, int inputs)
        {
            Begin(request, Answer.Box);
            _writer.Number(ProtocolVersion.Current);
            _writer.Number(profile.Major);
            _writer.Number(profile.Minor);
            _writer.Number(profile.Patch);
            _writer.Word(profile.Board);
            _writer.Number(profile.BootId);
            _writer.Number(FrequencyGrid.ClockHz);
            _writer.Number(profile.MostDutyBits);
            _writer.Number(profile.LowestHz);
            _writer.Number(profile.HighestHz);
            _writer.Number(WireLimits.PlanEntries);
            _writer.Number(WireLimits.SweepPoints);
            _writer.Number(WireLimits.SamplesPerPoint);
            _writer.Number(profile.FullCounts);
            _writer.Number(inputs);
            Send();
        }

        public void Limits(int request, DriveLimits limits)
        {
            Begin(request, Answer.Limits);
            _writer.Number(limits.LowHz);
            _writer.Number(limits.HighHz);
            _writer.Number(limits.PedestalCounts);
            _writer.Number(limits.FieldCounts);
            Send();
        }

        public void Planned(int request, int settings)
        {
            Begin(request, Answer.Planned);
            _writer.Number(settings);
            Send();
        }

        public void Dark(int request, int channel, Sampler samples)
        {
            Begin(request, Answer.Dark);
            _writer.Number(channel);
            Statistics(samples);
            _writer.Number(samples.FromUs);
            _writer.Number(samples.ToUs);
            Send();
        }

        public void Point(int request, int index, int dutyBits, int divider, int dutyCount, Sampler samples)
        {
            Begin(request, Answer.Point);
            _writer.Number(index);
            _writer.Number(dutyBits);
            _writer.Number(divider);
            _writer.Number(dutyCount);
            Statistics(samples);
            _writer.Number(samples.MiddleUs);
            Send();
        }

        public void Pack(int request, PackBuffer pack)
        {
            Begin(request, Answer.Pack);
            pack.Write(_writer);
            Send();
        }

        /// <summary>Some of the pairs of time and level of one repeat.</summary>
        public void Decay(int request, int repeat, int[] timesUs, int[] levels, int first, int count)
        {
            Begin(request, Answer.Decay);
            _writer.Number(repeat);
            for (int i = first; i < first + count; i++)
            {
                _writer.Number(timesUs[i]);
                _writer.Number(levels[i]);
            }

            Send();
        }

        public void Alive(int request)
        {
            Begin(request, Answer.Alive);
            _writer.Number(_clock.NowUs());
            Send();
        }

        public void Done(int request, int count, int ending, int code)
        {
            Begin(request, Answer.Done);
            _writer.Number(count);
            _writer.Number(ending);
            _writer.Number(code);
            _writer.Number(_clock.NowUs());
            Send();
        }

        public void Halted(int request)
        {
            Begin(request, Answer.Halted);
            _writer.Number(_clock.NowUs());
            Send();
        }

        public void Fault(int request, int code)
        {
            Begin(request, Answer.Fault);
            _writer.Number(code);
            _writer.Word(FaultCode.Text(code));
            Send();
        }

        private void Statistics(Sampler samples)
        {
            _writer.Number(samples.Samples);
            _writer.Number(samples.Sum);
            _writer.Number(samples.Squares);
            _writer.Number(samples.Smallest);
            _writer.Number(samples.Largest);
        }

        private void Begin(int request, string word)
        {
            _writer.BeginBox(_lineNumber, request);
            _writer.Word(word);
        }

        private void Send()
        {
            int count = _writer.End();
            _lineNumber = _lineNumber == WireLimits.LastLineNumber ? 0 : _lineNumber + 1;
            _lastUs = _clock.NowUs();
            if (count == 0)
            {
                throw new BoxFault(FaultCode.Internal);
            }

            try
            {
                _link.Send(_writer.Buffer, count);
            }
            catch (Exception)
            {
                throw new BoxFault(FaultCode.Internal);
            }

            _lastUs = _clock.NowUs();
        }
    }
}
