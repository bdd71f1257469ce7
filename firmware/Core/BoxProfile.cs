using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>What one board is: fixed from its start on, apart from what `limits` may change later.</summary>
    public sealed class BoxProfile
    {
        /// <param name="board">A word without spaces that names the board.</param>
        /// <param name="bootId">A number drawn at each start, 1 or more.</param>
        /// <param name="mostDutyBits">19 on the classic ESP32, 13 on S2, S3 and C3.</param>
        public BoxProfile(string board, int bootId, int mostDutyBits)
        {
            Board = board;
            BootId = bootId;
            MostDutyBits = mostDutyBits;
            Major = FirmwareVersion.Major;
            Minor = FirmwareVersion.Minor;
            Patch = FirmwareVersion.Patch;
            LowestHz = WireLimits.LowestHz;
            HighestHz = WireLimits.HighestHz;
            FullCounts = 4095;
            PedestalCounts = 400;
            FieldCounts = (FullCounts - PedestalCounts) / 20;
        }

        public string Board { get; }

        public int BootId { get; }

        public int MostDutyBits { get; }

        public int Major { get; set; }

        public int Minor { get; set; }

        public int Patch { get; set; }

        /// <summary>Lowest frequency that this board may ever drive, Hz.</summary>
        public int LowestHz { get; set; }

        /// <summary>Highest frequency that this board may ever drive, Hz.</summary>
        public int HighestHz { get; set; }

        /// <summary>The largest raw count of the converter.</summary>
        public int FullCounts { get; set; }

        /// <summary>The detector's level with nothing there until the host tells better, raw counts.</summary>
        public int PedestalCounts { get; set; }

        /// <summary>Counts above the pedestal that mean a foreign field until the host tells better: 5 % of the span.</summary>
        public int FieldCounts { get; set; }
    }
}
