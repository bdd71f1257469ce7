using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>What may be driven, and what the detector must read before anything is.</summary>
    internal sealed class DriveLimits
    {
        private readonly BoxProfile _profile;

        public DriveLimits(BoxProfile profile)
        {
            _profile = profile;
            LowHz = profile.LowestHz;
            HighHz = profile.HighestHz;
            PedestalCounts = profile.PedestalCounts;
            FieldCounts = profile.FieldCounts;
        }

        public int LowHz { get; private set; }

        public int HighHz { get; private set; }

        public int PedestalCounts { get; private set; }

        public int FieldCounts { get; private set; }

        /// <summary>A sample above this, drive off, is a foreign field. A saturated converter always is.</summary>
        public int ThresholdCounts
        {
            get
            {
                int threshold = PedestalCounts + FieldCounts;
                return threshold < _profile.FullCounts ? threshold : _profile.FullCounts - 1;
            }
        }

        /// <returns>False, with nothing changed, if the bounds are the wrong way round or beyond what the board may do.</returns>
        public bool TryChange(int lowHz, int highHz, int pedestalCounts, int fieldCounts)
        {
            if (lowHz < _profile.LowestHz || highHz > _profile.HighestHz || lowHz > highHz)
            {
                return false;
            }

            LowHz = lowHz;
            HighHz = highHz;
            PedestalCounts = pedestalCounts;
            FieldCounts = fieldCounts;
            return true;
        }

        /// <summary>True if the board can make this setting and it may be driven.</summary>
        public bool Allow(int dutyBits, long divider, int dutyCount)
        {
            if (divider < 1 || divider > int.MaxValue || !FrequencyGrid.IsRealisable(dutyBits, (int)divider, _profile.MostDutyBits))
            {
                return false;
            }

            int hz = FrequencyGrid.RequestHz(dutyBits, (int)divider);
            return hz >= LowHz && hz <= HighHz && dutyCount >= 1 && dutyCount < 1 << dutyBits;
        }
    }
}
