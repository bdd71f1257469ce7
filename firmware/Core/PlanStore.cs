using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>The settings to sweep, held as runs of equally spaced dividers.</summary>
    internal sealed class PlanStore
    {
        private readonly DriveLimits _limits;
        private readonly int[] _dutyBits = new int[WireLimits.PlanEntries];
        private readonly int[] _firstDivider = new int[WireLimits.PlanEntries];
        private readonly int[] _stride = new int[WireLimits.PlanEntries];
        private readonly int[] _count = new int[WireLimits.PlanEntries];
        private readonly int[] _dutyCount = new int[WireLimits.PlanEntries];

        public PlanStore(DriveLimits limits)
        {
            _limits = limits;
        }

        public int Entries { get; private set; }

        /// <summary>Settings in all.</summary>
        public int Settings { get; private set; }

        public void Clear()
        {
            Entries = 0;
            Settings = 0;
        }

        /// <summary>Adds a run.</summary>
        /// <returns>A code of Protocol.FaultCode; if it is not None, nothing was added.</returns>
        public int TryAdd(int dutyBits, int firstDivider, int stride, int count, int dutyCount)
        {
            if (Entries == WireLimits.PlanEntries || Settings + count > WireLimits.SweepPoints)
            {
                return FaultCode.PlanFull;
            }

            if (!AllowRun(dutyBits, firstDivider, stride, count, dutyCount))
            {
                return FaultCode.OutsideLimits;
            }

            _dutyBits[Entries] = dutyBits;
            _firstDivider[Entries] = firstDivider;
            _stride[Entries] = stride;
            _count[Entries] = count;
            _dutyCount[Entries] = dutyCount;
            Entries++;
            Settings += count;
            return FaultCode.None;
        }

        /// <summary>Takes back the entries added since there were so many, when a later setting of their line is refused.</summary>
        public void CutBack(int entries)
        {
            while (Entries > entries)
            {
                Entries--;
                Settings -= _count[Entries];
            }
        }

        /// <summary>True if every setting is still within the limits, which may have changed since it was added.</summary>
        public bool IsAllowed()
        {
            for (int i = 0; i < Entries; i++)
            {
                if (!AllowRun(_dutyBits[i], _firstDivider[i], _stride[i], _count[i], _dutyCount[i]))
                {
                    return false;
                }
            }

            return true;
        }

        public int CountOf(int entry)
        {
            return _count[entry];
        }

        public int DutyBitsOf(int entry)
        {
            return _dutyBits[entry];
        }

        public int DutyCountOf(int entry)
        {
            return _dutyCount[entry];
        }

        public int DividerOf(int entry, int position)
        {
            return _firstDivider[entry] + position * _stride[entry];
        }

        // The two ends speak for what lies between. Duty bits fall as the request rises, so that equal bits at both ends are
        // equal bits throughout; and from 8 kHz up neighbouring dividers are 15 Hz or more apart, so that the rounding of a
        // request to whole hertz cannot change the divider.
        private bool AllowRun(int dutyBits, int firstDivider, int stride, int count, int dutyCount)
        {
            long lastDivider = firstDivider + (long)stride * (count - 1);
            return _limits.Allow(dutyBits, firstDivider, dutyCount) && _limits.Allow(dutyBits, lastDivider, dutyCount);
        }
    }
}
