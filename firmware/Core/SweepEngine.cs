using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>
    /// A `sweep`: setting by setting, wait, sample, report. The next setting is made before the last point is reported, so
    /// that the detector settles while the line goes out.
    /// </summary>
    internal sealed class SweepEngine : DrivenActivity
    {
        private readonly PlanCursor _cursor;
        private readonly PackBuffer _pack = new PackBuffer();
        private int _dwellUs;
        private int _samples;
        private int _spacingUs;
        private int _pointsPerLine;
        private int _channel;
        private int _index;
        private int _dutyBits;
        private int _divider;
        private int _dutyCount;
        private long _settledUs;
        private bool _started;
        private bool _sampling;
        private bool _unreported;

        public SweepEngine(PlanStore plan, Talker talker, Sampler sampler, SteadyClock clock, Drive drive, DriveInterlock interlock)
            : base(talker, sampler, clock, drive, interlock)
        {
            _cursor = new PlanCursor(plan);
        }

        /// <summary>Begins with the look. Times in microseconds; 0 points per line: a `point` line for each.</summary>
        public void Begin(int request, int dwellUs, int samples, int spacingUs, int order, int pointsPerLine, int channel)
        {
            _dwellUs = dwellUs;
            _samples = samples;
            _spacingUs = spacingUs;
            _pointsPerLine = pointsPerLine;
            _channel = channel;
            _index = 0;
            _started = false;
            _sampling = false;
            _unreported = false;
            _pack.Clear();
            _cursor.Begin(order);
            BeginLook(request);
        }

        protected override void Work(long untilUs)
        {
            if (!_started)
            {
                _started = true;
                MakeSetting();
                Drive.Start();
                _settledUs = Clock.NowUs() + _dwellUs;
            }

            if (!_sampling)
            {
                Clock.WaitUntilUs(_settledUs < untilUs ? _settledUs : untilUs);
                if (Clock.NowUs() < _settledUs)
                {
                    return;
                }

                Sampler.BeginCount(_channel, _samples, _spacingUs);
                _sampling = true;
            }

            if (Sampler.Advance(untilUs))
            {
                EndPoint();
            }
        }

        protected override void ReportRest()
        {
            if (_unreported)
            {
                ReportPoint();
            }

            FlushPack();
        }

        private void EndPoint()
        {
            _sampling = false;
            _unreported = true;
            if (_index + 1 < _cursor.Points)
            {
                _cursor.Next();
                MakeSetting();
                ReportPoint();
                return;
            }

            EndEarly(Ending.Complete, FaultCode.None);
        }

        private void MakeSetting()
        {
            Drive.Set(_cursor.DutyBits, _cursor.Divider, _cursor.DutyCount);
            _settledUs = Clock.NowUs() + _dwellUs;
            if (!_unreported)
            {
                TakeSetting();
            }
        }

        private void TakeSetting()
        {
            _dutyBits = _cursor.DutyBits;
            _divider = _cursor.Divider;
            _dutyCount = _cursor.DutyCount;
        }

        private void ReportPoint()
        {
            if (_pointsPerLine == 0)
            {
                Talker.Point(Request, _index, _dutyBits, _divider, _dutyCount, Sampler);
                _unreported = false;
                Count++;
            }
            else
            {
                if (!_pack.HasRoomFor(Sampler))
                {
                    FlushPack();
                }

                _pack.Add(_index, Sampler);
                _unreported = false;
            }

            _index++;
            TakeSetting();
            if (_pack.Count == _pointsPerLine)
            {
                FlushPack();
            }
        }

        private void FlushPack()
        {
            if (_pack.Count > 0)
            {
                int count = _pack.Count;
                Talker.Pack(Request, _pack);
                _pack.Clear();
                Count += count;
            }
        }
    }
}
