using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>
    /// The requests that take longer than one step: `dark`, `sweep`, `ring`. Each method returns a code of
    /// Protocol.FaultCode and, if it is None, has set <see cref="Current"/>.
    /// </summary>
    internal sealed class WorkRequests
    {
        private readonly IPickup _pickup;
        private readonly Drive _drive;
        private readonly DriveLimits _limits;
        private readonly PlanStore _plan;
        private readonly DarkTask _dark;
        private readonly SweepEngine _sweep;
        private readonly RingEngine _ring;

        public WorkRequests(
            IPickup pickup, Drive drive, DriveLimits limits, PlanStore plan, DarkTask dark, SweepEngine sweep, RingEngine ring)
        {
            _pickup = pickup;
            _drive = drive;
            _limits = limits;
            _plan = plan;
            _dark = dark;
            _sweep = sweep;
            _ring = ring;
        }

        /// <summary>The work in progress, or null.</summary>
        public Activity Current { get; set; }

        public int Dark(int request, RequestFields fields)
        {
            if (!fields.Take(1, WireLimits.LongestDarkMs, out int durationMs)
                || !fields.Take(0, WireLimits.LongestSpacingUs, out int spacingUs)
                || !fields.Take(0, int.MaxValue, out int channel)
                || fields.More)
            {
                return FaultCode.BadFields;
            }

            if (!HasInput(channel))
            {
                return FaultCode.NoSuchInput;
            }

            _dark.Begin(request, durationMs, spacingUs, channel);
            Current = _dark;
            return FaultCode.None;
        }

        public int Sweep(int request, RequestFields fields)
        {
            if (!fields.Take(0, WireLimits.LongestDwellUs, out int dwellUs)
                || !fields.Take(1, WireLimits.SamplesPerPoint, out int samples)
                || !fields.Take(0, WireLimits.LongestSpacingUs, out int spacingUs)
                || !fields.Take(SweepOrder.AsPlanned, SweepOrder.ThereAndBack, out int order)
                || !fields.Take(0, WireLimits.PointsPerPack, out int pointsPerLine)
                || pointsPerLine == 1
                || !fields.Take(0, int.MaxValue, out int channel)
                || fields.More)
            {
                return FaultCode.BadFields;
            }

            int code = MaySweep(order, channel);
            if (code == FaultCode.None)
            {
                _sweep.Begin(request, dwellUs, samples, spacingUs, order, pointsPerLine, channel);
                Current = _sweep;
            }

            return code;
        }

        public int Ring(int request, RequestFields fields)
        {
            if (!fields.TakeDutyBits(out int bits)
                || !fields.TakeDivider(out int divider)
                || !fields.TakeDutyCount(out int duty)
                || !fields.Take(1, WireLimits.LongestDwellUs, out int driveUs)
                || !fields.Take(0, WireLimits.LongestRingDelayUs, out int delayUs)
                || !fields.Take(0, WireLimits.LongestRingDelayUs, out int staggerUs)
                || !fields.Take(1, WireLimits.RingSamples, out int samples)
                || !fields.Take(1, WireLimits.RingRepeats, out int repeats)
                || fields.More
                || delayUs + (repeats - 1L) * staggerUs > WireLimits.LongestRingDelayUs)
            {
                return FaultCode.BadFields;
            }

            int code = _limits.Allow(bits, divider, duty) ? MayDrive() : FaultCode.OutsideLimits;
            if (code == FaultCode.None)
            {
                _ring.SetTimes(driveUs, delayUs, staggerUs, samples, repeats);
                _ring.Begin(request, bits, divider, duty);
                Current = _ring;
            }

            return code;
        }

        private int MaySweep(int order, int channel)
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

        private int MayDrive()
        {
            if (_drive.IsUnsure)
            {
                return FaultCode.DriveFailed;
            }

            // The look needs the detector, whatever is to be measured.
            return HasInput(Channel.Detector) ? FaultCode.None : FaultCode.NoSuchInput;
        }

        private bool HasInput(int channel)
        {
            return channel < Channel.Count && _pickup.Has(channel);
        }
    }
}
