using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>A `dark` request: samples with the drive off.</summary>
    internal sealed class DarkTask : Activity
    {
        private readonly Talker _talker;
        private readonly Sampler _sampler;
        private readonly DriveInterlock _interlock;
        private int _channel;
        private int _durationMs;

        public DarkTask(Talker talker, Sampler sampler, DriveInterlock interlock)
        {
            _talker = talker;
            _sampler = sampler;
            _interlock = interlock;
        }

        public override bool Drives
        {
            get { return false; }
        }

        public void Begin(int request, int durationMs, int spacingUs, int channel)
        {
            Request = request;
            IsFinished = false;
            _channel = channel;
            _durationMs = durationMs;
            _sampler.BeginTime(channel, durationMs * 1000L, spacingUs);
        }

        public override void Advance(long untilUs)
        {
            if (!_sampler.Advance(untilUs))
            {
                return;
            }

            if (_channel == Channel.Detector && _durationMs >= WireLimits.LongLookMs)
            {
                _interlock.AcceptLongLook();
            }

            IsFinished = true;
            _talker.Dark(Request, _channel, _sampler);
        }

        public override void EndEarly(int ending, int code)
        {
            IsFinished = true;
            if (code != FaultCode.None)
            {
                _talker.Fault(Request, code);
            }
        }
    }
}
