using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>A `ring`: drive, stop, wait, and follow the decay, repeat by repeat.</summary>
    internal sealed class RingEngine : DrivenActivity
    {
        // The end of the drive, the wait and the samples must not be disturbed by a line: the last stretch of each wait is
        // this long, and the box speaks before it unless it has just spoken.
        private const long StretchUs = 10000;
        private const long FreshUs = 5000;

        private readonly int[] _timesUs = new int[WireLimits.RingSamples];
        private readonly int[] _levels = new int[WireLimits.RingSamples];
        private int _dutyBits;
        private int _divider;
        private int _dutyCount;
        private int _driveUs;
        private int _delayUs;
        private int _staggerUs;
        private int _samples;
        private int _repeats;
        private RingPhase _phase;
        private long _untilUs;
        private long _stoppedUs;
        private int _reported;

        public RingEngine(Talker talker, Sampler sampler, SteadyClock clock, Drive drive, DriveInterlock interlock)
            : base(talker, sampler, clock, drive, interlock)
        {
        }

        public void Begin(int request, int dutyBits, int divider, int dutyCount)
        {
            _dutyBits = dutyBits;
            _divider = divider;
            _dutyCount = dutyCount;
            _phase = RingPhase.Start;
            BeginLook(request);
        }

        public void SetTimes(int driveUs, int delayUs, int staggerUs, int samples, int repeats)
        {
            _driveUs = driveUs;
            _delayUs = delayUs;
            _staggerUs = staggerUs;
            _samples = samples;
            _repeats = repeats;
        }

        protected override void Work(long untilUs)
        {
            switch (_phase)
            {
                case RingPhase.Start:
                    Drive.Set(_dutyBits, _divider, _dutyCount);
                    SpeakUnlessFresh();
                    Drive.Start();
                    _untilUs = Clock.NowUs() + _driveUs;
                    _phase = RingPhase.Driving;
                    break;
                case RingPhase.Driving:
                    if (ReachStretch(untilUs, _driveUs))
                    {
                        Clock.WaitUntilUs(_untilUs);
                        Stop();
                    }

                    break;
                case RingPhase.Waiting:
                    if (ReachStretch(untilUs, _delayUs + Count * _staggerUs))
                    {
                        Clock.WaitUntilUs(_untilUs);
                        Follow();
                    }

                    break;
                default:
                    Report();
                    break;
            }
        }

        protected override void ReportRest()
        {
            // A repeat cut short is worth nothing.
        }

        // True when only the last, undisturbed stretch of a wait is left.
        private bool ReachStretch(long untilUs, long wholeUs)
        {
            if (wholeUs <= StretchUs)
            {
                return true;
            }

            long stretchUs = _untilUs - StretchUs;
            Clock.WaitUntilUs(stretchUs < untilUs ? stretchUs : untilUs);
            if (Clock.NowUs() < stretchUs)
            {
                return false;
            }

            SpeakUnlessFresh();
            return true;
        }

        private void SpeakUnlessFresh()
        {
            if (Clock.NowUs() - Talker.LastUs > FreshUs)
            {
                Talker.Alive(Request);
            }
        }

        private void Stop()
        {
            long beforeUs = Clock.NowUs();
            if (!StopDrive())
            {
                throw new BoxFault(FaultCode.DriveFailed);
            }

            _stoppedUs = beforeUs + (Clock.NowUs() - beforeUs) / 2;
            _untilUs = _stoppedUs + _delayUs + (long)Count * _staggerUs;
            _phase = RingPhase.Waiting;
            if (_untilUs - _stoppedUs <= StretchUs)
            {
                Clock.WaitUntilUs(_untilUs);
                Follow();
            }
        }

        private void Follow()
        {
            long beforeUs = Clock.NowUs() - _stoppedUs;
            for (int i = 0; i < _samples; i++)
            {
                _levels[i] = Sampler.ReadOne(Channel.Detector);
                long afterUs = Clock.NowUs() - _stoppedUs;
                _timesUs[i] = (int)((beforeUs + afterUs) / 2);
                beforeUs = afterUs;
            }

            _reported = 0;
            _phase = RingPhase.Reporting;
        }

        private void Report()
        {
            int count = _samples - _reported;
            if (count > WireLimits.PairsPerDecay)
            {
                count = WireLimits.PairsPerDecay;
            }

            Talker.Decay(Request, Count, _timesUs, _levels, _reported, count);
            _reported += count;
            if (_reported < _samples)
            {
                return;
            }

            Count++;
            _phase = RingPhase.Start;
            if (Count == _repeats)
            {
                EndEarly(Ending.Complete, FaultCode.None);
            }
        }
    }
}
