namespace Looseloop.Firmware
{
    /// <summary>
    /// The board's clock, kept from running backwards: a clock that fell back would hold up the host-silence stop.
    /// A clock that leaps ahead is let through, because that stops the drive too early and never too late.
    /// </summary>
    internal sealed class SteadyClock
    {
        private readonly IClock _clock;
        private long _lastUs;
        private long _addedUs;

        public SteadyClock(IClock clock)
        {
            _clock = clock;
        }

        public long NowUs()
        {
            long nowUs = _clock.NowUs() + _addedUs;
            if (nowUs < _lastUs)
            {
                _addedUs += _lastUs - nowUs;
                nowUs = _lastUs;
            }

            _lastUs = nowUs;
            return nowUs;
        }

        public void WaitUntilUs(long timeUs)
        {
            if (timeUs > NowUs())
            {
                _clock.WaitUntilUs(timeUs - _addedUs);
            }
        }
    }
}
