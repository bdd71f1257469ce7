using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>What sweep and ring share: the look before the drive, and an end that leaves the drive off.</summary>
    internal abstract class DrivenActivity : Activity
    {
        protected readonly Talker Talker;
        protected readonly Sampler Sampler;
        protected readonly SteadyClock Clock;
        protected readonly Drive Drive;
        private readonly DriveInterlock _interlock;
        private bool _looking;

        protected DrivenActivity(Talker talker, Sampler sampler, SteadyClock clock, Drive drive, DriveInterlock interlock)
        {
            Talker = talker;
            Sampler = sampler;
            Clock = clock;
            Drive = drive;
            _interlock = interlock;
        }

        public override bool Drives
        {
            get { return true; }
        }

        /// <summary>Points or repeats that have been reported.</summary>
        protected int Count { get; set; }

        public override void Advance(long untilUs)
        {
            if (!_looking)
            {
                Work(untilUs);
                return;
            }

            if (!_interlock.Advance(untilUs))
            {
                return;
            }

            _looking = false;
            Talker.Dark(Request, Channel.Detector, Sampler);
            if (_interlock.Finding != FaultCode.None)
            {
                EndEarly(Ending.Faulted, _interlock.Finding);
            }
        }

        public override void EndEarly(int ending, int code)
        {
            if (!StopDrive() && code == FaultCode.None)
            {
                ending = Ending.Faulted;
                code = FaultCode.DriveFailed;
            }

            ReportRest();
            if (code != FaultCode.None)
            {
                Talker.Fault(Request, code);
            }

            Talker.Done(Request, Count, ending, code);
            IsFinished = true;
        }

        protected void BeginLook(int request)
        {
            Request = request;
            IsFinished = false;
            Count = 0;
            _looking = true;
            _interlock.Begin(Clock.NowUs());
        }

        protected bool StopDrive()
        {
            bool ran = Drive.MayRun;
            bool stopped = Drive.Stop();
            if (ran)
            {
                _interlock.DriveEnded(Clock.NowUs());
            }

            return stopped;
        }

        /// <summary>Does a piece of the work proper, after the look.</summary>
        protected abstract void Work(long untilUs);

        /// <summary>Sends what has been measured and not been sent.</summary>
        protected abstract void ReportRest();
    }
}
