using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Does, or begins, what a host line asks.</summary>
    internal sealed class RequestHandler
    {
        private readonly RequestFields _fields = new RequestFields();
        private readonly BoxProfile _profile;
        private readonly IPickup _pickup;
        private readonly Talker _talker;
        private readonly DriveLimits _limits;
        private readonly DriveInterlock _interlock;
        private readonly PlanRequests _planning;
        private readonly WorkRequests _work;

        public RequestHandler(BoxProfile profile, IPickup pickup, Talker talker, SteadyClock clock, Drive drive)
        {
            _profile = profile;
            _pickup = pickup;
            _talker = talker;
            _limits = new DriveLimits(profile);
            var sampler = new Sampler(pickup, clock, profile.FullCounts);
            _interlock = new DriveInterlock(_limits, sampler, clock);
            var plan = new PlanStore(_limits);
            _planning = new PlanRequests(plan, talker);
            var dark = new DarkTask(talker, sampler, _interlock);
            var sweep = new SweepEngine(plan, talker, sampler, clock, drive, _interlock);
            var ring = new RingEngine(talker, sampler, clock, drive, _interlock);
            _work = new WorkRequests(pickup, drive, _limits, plan, dark, sweep, ring);
        }

        /// <summary>The work in progress, or null.</summary>
        public Activity Current
        {
            get { return _work.Current; }
            set { _work.Current = value; }
        }

        /// <summary>The number of the request being handled, or handled last; 0 if that line had none.</summary>
        public int Request { get; private set; }

        /// <summary>True if the line has its mark and a right checksum; it can then be handled.</summary>
        public bool Open(byte[] line, int count)
        {
            Request = 0;
            return _fields.Open(line, count);
        }

        /// <summary>Handles the line that was opened.</summary>
        public void Handle()
        {
            int code = FaultCode.BadFields;
            if (_fields.Take(1, WireLimits.LastRequestNumber, out int number))
            {
                Request = number;
                if (_fields.TakeWord())
                {
                    code = Do();
                }
            }

            if (code != FaultCode.None)
            {
                _talker.Fault(Request, code);
            }
        }

        private int Do()
        {
            if (_fields.Is(Verb.Keep))
            {
                return _fields.More ? FaultCode.BadFields : FaultCode.None;
            }

            if (_fields.Is(Verb.Halt))
            {
                return Halt();
            }

            if (Current != null)
            {
                // The sender's second try of what is being answered already needs no answer of its own.
                return Request == Current.Request ? FaultCode.None : FaultCode.Busy;
            }

            if (_fields.Is(Verb.Run))
            {
                return _planning.Run(Request, _fields);
            }

            if (_fields.Is(Verb.List))
            {
                return _planning.List(Request, _fields);
            }

            _planning.ForgetLast();
            return DoOther();
        }

        private int DoOther()
        {
            if (_fields.Is(Verb.Sweep))
            {
                return _work.Sweep(Request, _fields);
            }

            if (_fields.Is(Verb.Dark))
            {
                return _work.Dark(Request, _fields);
            }

            if (_fields.Is(Verb.Ring))
            {
                return _work.Ring(Request, _fields);
            }

            if (_fields.Is(Verb.Plan))
            {
                return _planning.Plan(Request, _fields);
            }

            if (_fields.Is(Verb.Limits))
            {
                return Limits();
            }

            return _fields.Is(Verb.Identify) ? Identify() : FaultCode.UnknownVerb;
        }

        private int Identify()
        {
            if (_fields.More)
            {
                return FaultCode.BadFields;
            }

            int inputs = 0;
            for (int channel = 0; channel < Channel.Count; channel++)
            {
                inputs += _pickup.Has(channel) ? 1 << channel : 0;
            }

            _interlock.RequireLongLook();
            _talker.Box(Request, _profile, inputs);
            return FaultCode.None;
        }

        private int Limits()
        {
            if (_fields.More && !ChangeLimits())
            {
                return FaultCode.BadFields;
            }

            _talker.Limits(Request, _limits);
            return FaultCode.None;
        }

        private bool ChangeLimits()
        {
            return _fields.Take(WireLimits.LowestHz, WireLimits.HighestHz, out int lowHz)
                && _fields.Take(WireLimits.LowestHz, WireLimits.HighestHz, out int highHz)
                && _fields.Take(0, WireLimits.HighestPedestalCounts, out int pedestal)
                && _fields.Take(1, _profile.FullCounts, out int field)
                && !_fields.More
                && _limits.TryChange(lowHz, highHz, pedestal, field);
        }

        private int Halt()
        {
            if (_fields.More)
            {
                return FaultCode.BadFields;
            }

            Activity current = Current;
            if (current != null)
            {
                current.EndEarly(Ending.Halted, FaultCode.None);
                Current = null;
            }

            _talker.Halted(Request);
            return FaultCode.None;
        }
    }
}
