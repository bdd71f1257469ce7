using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>
    /// The look at the detector, drive off, before anything is driven. A coil that is run in bursts is silent most of the
    /// time: the first look, and any look after a pause, must be long.
    /// </summary>
    internal sealed class DriveInterlock
    {
        private readonly DriveLimits _limits;
        private readonly Sampler _sampler;
        private readonly SteadyClock _clock;
        private bool _longLookDue = true;
        private bool _thisIsLong;
        private bool _ringIsDead;
        private long _ringOutUs;
        private long _quietUs;

        public DriveInterlock(DriveLimits limits, Sampler sampler, SteadyClock clock)
        {
            _limits = limits;
            _sampler = sampler;
            _clock = clock;
        }

        /// <summary>What the look that has ended found: a code of Protocol.FaultCode, None if driving is allowed.</summary>
        public int Finding { get; private set; }

        /// <summary>Makes the next look long, whatever went before.</summary>
        public void RequireLongLook()
        {
            _longLookDue = true;
        }

        public void DriveEnded(long nowUs)
        {
            _quietUs = nowUs;
        }

        /// <summary>Counts samples that a `dark` request took as a long look, if they were clean.</summary>
        public void AcceptLongLook()
        {
            if (Judge() == FaultCode.None)
            {
                _longLookDue = false;
                _quietUs = _sampler.ToUs;
            }
        }

        public void Begin(long nowUs)
        {
            _thisIsLong = _longLookDue || nowUs - _quietUs > WireLimits.LongLookAfterMs * 1000L;
            _ringIsDead = false;
            _ringOutUs = nowUs + WireLimits.RingOutMs * 1000L;
        }

        /// <returns>True if the look has ended; its samples are in the sampler.</returns>
        public bool Advance(long untilUs)
        {
            if (!_ringIsDead)
            {
                if (!AwaitOwnRing(untilUs))
                {
                    return false;
                }

                _ringIsDead = true;
                long lookMs = _thisIsLong ? WireLimits.LongLookMs : WireLimits.ShortLookMs;
                _sampler.BeginTime(Channel.Detector, lookMs * 1000L, 0);
            }

            if (!_sampler.Advance(untilUs))
            {
                return false;
            }

            Finding = Judge();
            if (Finding != FaultCode.None)
            {
                _longLookDue = true;
            }
            else if (_thisIsLong)
            {
                _longLookDue = false;
                _quietUs = _sampler.ToUs;
            }

            return true;
        }

        private bool AwaitOwnRing(long untilUs)
        {
            int threshold = _limits.ThresholdCounts;
            long nowUs;
            do
            {
                if (_sampler.ReadOne(Channel.Detector) <= threshold)
                {
                    return true;
                }

                nowUs = _clock.NowUs();
                if (nowUs >= _ringOutUs)
                {
                    return true;
                }
            }
            while (nowUs < untilUs);

            return false;
        }

        private int Judge()
        {
            if (_sampler.Largest > _limits.ThresholdCounts)
            {
                return FaultCode.FieldPresent;
            }

            return _sampler.Largest > 0 ? FaultCode.None : FaultCode.PickupBelowRange;
        }
    }
}
