using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Takes a host line apart and does, or begins, what it asks.</summary>
    internal sealed class RequestHandler
    {
        private const int LargestDivider = 1023 * FrequencyGrid.DividerScale;
        private const int SettingsPerList = 8;

        private readonly LineReader _reader = new LineReader();
        private readonly BoxProfile _profile;
        private readonly IPickup _pickup;
        private readonly Talker _talker;
        private readonly Drive _drive;
        private readonly DriveInterlock _interlock;
        private readonly DriveLimits _limits;
        private readonly PlanStore _plan;
        private readonly DarkTask _dark;
        private readonly SweepEngine _sweep;
        private readonly RingEngine _ring;
        private int _lastPlanned; // number of the `run` or `list` that was the last request done, else 0
        private long _field;

        public RequestHandler(
            BoxProfile profile, IPickup pickup, Talker talker, SteadyClock clock, Drive drive)
        {
            _profile = profile;
            _pickup = pickup;
            _talker = talker;
            _drive = drive;
            var sampler = new Sampler(pickup, clock, profile.FullCounts);
            _limits = new DriveLimits(profile);
            _interlock = new DriveInterlock(_limits, sampler, clock);
            _plan = new PlanStore(_limits);
            _dark = new DarkTask(talker, sampler, _interlock);
            _sweep = new SweepEngine(_plan, talker, sampler, clock, drive, _interlock);
            _ring = new RingEngine(talker, sampler, clock, drive, _interlock);
        }

        /// <summary>The work in progress, or null.</summary>
        public Activity Current { get; set; }

        /// <summary>The number of the request being handled; 0 between requests.</summary>
        public int Request { get; private set; }

        /// <summary>True if the line has its mark and a right checksum; it can then be handled.</summary>
        public bool Open(byte[] line, int count)
        {
            return _reader.Open(line, count, LineWriter.HostMark);
        }

        /// <summary>Handles the line that was opened.</summary>
        public void Handle()
        {
            Request = 0;
            if (!Field(1, WireLimits.LastRequestNumber))
            {
                _talker.Fault(0, FaultCode.BadFields);
                return;
            }

            Request = (int)_field;
            int code = _reader.TryWord() ? Do() : FaultCode.BadFields;
            if (code != FaultCode.None)
            {
                _talker.Fault(Request, code);
            }

            Request = 0;
        }

        private int Do()
        {
            if (_reader.WordIs(Verb.Keep))
            {
                return NoMoreFields();
            }

            if (_reader.WordIs(Verb.Halt))
            {
                return Halt();
            }

            if (Current != null)
            {
                // The sender's second try of what is being answered already needs no answer of its own.
                return Request == Current.Request ? FaultCode.None : FaultCode.Busy;
            }

            bool again = Request == _lastPlanned;
            _lastPlanned = 0;
            if (_reader.WordIs(Verb.Run))
            {
                return again ? Planned() : Run();
            }

            if (_reader.WordIs(Verb.List))
            {
                return again ? Planned() : List();
            }

            return DoOther();
        }

        private int DoOther()
        {
            if (_reader.WordIs(Verb.Sweep))
            {
                return Sweep();
            }

            if (_reader.WordIs(Verb.Dark))
            {
                return Dark();
            }

            if (_reader.WordIs(Verb.Ring))
            {
                return Ring();
            }

            if (_reader.WordIs(Verb.Plan))
            {
                return Plan();
            }

            if (_reader.WordIs(Verb.Limits))
            {
                return Limits();
            }

            return _reader.WordIs(Verb.Identify) ? Identify() : FaultCode.UnknownVerb;
        }

        private int Identify()
        {
            if (_reader.More)
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
            if (_reader.More)
            {
                if (!Field(WireLimits.LowestHz, WireLimits.HighestHz))
                {
                    return FaultCode.BadFields;
                }

                int lowHz = (int)_field;
                if (!Field(WireLimits.LowestHz, WireLimits.HighestHz))
                {
                    return FaultCode.BadFields;
                }

                int highHz = (int)_field;
                if (!Field(0, WireLimits.HighestPedestalCounts))
                {
                    return FaultCode.BadFields;
                }

                int pedestal = (int)_field;
                if (!Field(1, _profile.FullCounts) || _reader.More || !_limits.TryChange(lowHz, highHz, pedestal, (int)_field))
                {
                    return FaultCode.BadFields;
                }
            }

            _talker.Limits(Request, _limits);
            return FaultCode.None;
        }

        private int Plan()
        {
            if (_reader.More)
            {
                return FaultCode.BadFields;
            }

            _plan.Clear();
            _talker.Planned(Request, _plan.Settings);
            return FaultCode.None;
        }

        private int Run()
        {
            if (!Field(1, FrequencyGrid.Esp32DutyBits))
            {
                return FaultCode.BadFields;
            }

            int bits = (int)_field;
            if (!Field(1, LargestDivider))
            {
                return FaultCode.BadFields;
            }

            int divider = (int)_field;
            if (!Field(-LargestDivider, LargestDivider))
            {
                return FaultCode.BadFields;
            }

            int stride = (int)_field;
            if (!Field(1, WireLimits.SweepPoints))
            {
                return FaultCode.BadFields;
            }

            int count = (int)_field;
            if (!Field(1, 1 << FrequencyGrid.Esp32DutyBits) || _reader.More)
            {
                return FaultCode.BadFields;
            }

            int code = _plan.TryAdd(bits, divider, stride, count, (int)_field);
            return code == FaultCode.None ? Planned() : code;
        }

        private int List()
        {
            int before = _plan.Entries;
            int code = FaultCode.None;
            int settings = 0;
            do
            {
                code = settings < SettingsPerList ? ListOne() : FaultCode.BadFields;
                settings++;
            }
            while (code == FaultCode.None && _reader.More);

            if (code != FaultCode.None)
            {
                _plan.CutBack(before);
                return code;
            }

            return Planned();
        }

        private int ListOne()
        {
            if (!Field(1, FrequencyGrid.Esp32DutyBits))
            {
                return FaultCode.BadFields;
            }

            int bits = (int)_field;
            if (!Field(1, LargestDivider))
            {
                return FaultCode.BadFields;
            }

            int divider = (int)_field;
            return Field(1, 1 << FrequencyGrid.Esp32DutyBits)
                ? _plan.TryAdd(bits, divider, 0, 1, (int)_field)
                : FaultCode.BadFields;
        }

        private int Planned()
        {
            _lastPlanned = Request;
            _talker.Planned(Request, _plan.Settings);
            return FaultCode.None;
        }

        private int Dark()
        {
            if (!Field(1, WireLimits.LongestDarkMs))
            {
                return FaultCode.BadFields;
            }

            int durationMs = (int)_field;
            if (!Field(0, WireLimits.LongestSpacingUs))
            {
                return FaultCode.BadFields;
            }

            int spacingUs = (int)_field;
            if (!Field(0, int.MaxValue) || _reader.More)
            {
                return FaultCode.BadFields;
            }

            if (!HasInput(_field))
            {
                return FaultCode.NoSuchInput;
            }

            _dark.Begin(Request, durationMs, spacingUs, (int)_field);
            Current = _dark;
            return FaultCode.None;
        }

        private int Sweep()
        {
            if (!Field(0, WireLimits.LongestDwellUs))
            {
                return FaultCode.BadFields;
            }

            int dwellUs = (int)_field;
            if (!Field(1, WireLimits.SamplesPerPoint))
            {
                return FaultCode.BadFields;
            }

            int samples = (int)_field;
            if (!Field(0, WireLimits.LongestSpacingUs))
            {
                return FaultCode.BadFields;
            }

            int spacingUs = (int)_field;
            if (!Field(SweepOrder.AsPlanned, SweepOrder.ThereAndBack))
            {
                return FaultCode.BadFields;
            }

            int order = (int)_field;
            if (!Field(0, WireLimits.PointsPerPack) || _field == 1)
            {
                return FaultCode.BadFields;
            }

            int pointsPerLine = (int)_field;
            if (!Field(0, int.MaxValue) || _reader.More)
            {
                return FaultCode.BadFields;
            }

            int code = MaySweep(order, _field);
            if (code == FaultCode.None)
            {
                _sweep.Begin(Request, dwellUs, samples, spacingUs, order, pointsPerLine, (int)_field);
                Current = _sweep;
            }

            return code;
        }

        private int MaySweep(int order, long channel)
        {
            if (_plan.Settings == 0)
            {
                return FaultCode.PlanEmpty;
            }

            if (order == SweepOrder.ThereAndBack && 2 * _plan.Settings > WireLimits.SweepPoints)
            {
                return FaultCode.PlanFull;
            }

            if (!HasInput(channel))
            {
                return FaultCode.NoSuchInput;
            }

            return _plan.IsAllowed() ? MayDrive() : FaultCode.OutsideLimits;
        }

        private int Ring()
        {
            if (!Field(1, FrequencyGrid.Esp32DutyBits))
            {
                return FaultCode.BadFields;
            }

            int bits = (int)_field;
            if (!Field(1, LargestDivider))
            {
                return FaultCode.BadFields;
            }

            int divider = (int)_field;
            if (!Field(1, 1 << FrequencyGrid.Esp32DutyBits))
            {
                return FaultCode.BadFields;
            }

            int duty = (int)_field;
            int code = RingTimes();
            if (code == FaultCode.None)
            {
                code = _limits.Allow(bits, divider, duty) ? MayDrive() : FaultCode.OutsideLimits;
            }

            if (code == FaultCode.None)
            {
                _ring.Begin(Request, bits, divider, duty);
                Current = _ring;
            }

            return code;
        }

        private int RingTimes()
        {
            if (!Field(1, WireLimits.LongestDwellUs))
            {
                return FaultCode.BadFields;
            }

            int driveUs = (int)_field;
            if (!Field(0, WireLimits.LongestRingDelayUs))
            {
                return FaultCode.BadFields;
            }

            int delayUs = (int)_field;
            if (!Field(0, WireLimits.LongestRingDelayUs))
            {
                return FaultCode.BadFields;
            }

            int staggerUs = (int)_field;
            if (!Field(1, WireLimits.RingSamples))
            {
                return FaultCode.BadFields;
            }

            int samples = (int)_field;
            if (!Field(1, WireLimits.RingRepeats) || _reader.More
                || delayUs + (_field - 1) * staggerUs > WireLimits.LongestRingDelayUs)
            {
                return FaultCode.BadFields;
            }

            _ring.SetTimes(driveUs, delayUs, staggerUs, samples, (int)_field);
            return FaultCode.None;
        }

        private int MayDrive()
        {
            if (_drive.IsUnsure)
            {
                return FaultCode.DriveFailed;
            }

            // The look needs the detector, whatever is to be measured.
            return HasInput(Channel.Detector) ? FaultCode.None : FaultCode.NoSuchInput;
        }

        private int Halt()
        {
            if (_reader.More)
            {
                return FaultCode.BadFields;
            }

            Activity current = Current;
            Current = null;
            if (current != null)
            {
                current.EndEarly(Ending.Halted, FaultCode.None);
            }

            _talker.Halted(Request);
            return FaultCode.None;
        }

        private int NoMoreFields()
        {
            return _reader.More ? FaultCode.BadFields : FaultCode.None;
        }

        private bool HasInput(long channel)
        {
            return channel < Channel.Count && _pickup.Has((int)channel);
        }

        private bool Field(long lowest, long highest)
        {
            return _reader.TryNumber(lowest, highest, out _field);
        }
    }
}
