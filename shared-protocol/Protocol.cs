namespace Looseloop.Protocol
{
    /// <summary>The protocol's version. A host talks only to a box whose version is equal.</summary>
    public static class ProtocolVersion
    {
        public const int Current = 1;
    }

    /// <summary>What a host may ask. The fields of each are in PROTOCOL.md.</summary>
    public static class Verb
    {
        public const string Identify = "identify";
        public const string Limits = "limits";
        public const string Dark = "dark";
        public const string Plan = "plan";
        public const string Run = "run";
        public const string List = "list";
        public const string Sweep = "sweep";
        public const string Ring = "ring";
        public const string Halt = "halt";
        public const string Keep = "keep";
    }

    /// <summary>What a box may say.</summary>
    public static class Answer
    {
        public const string Box = "box";
        public const string Limits = "limits";
        public const string Dark = "dark";
        public const string Planned = "planned";
        public const string Point = "point";
        public const string Pack = "pack";
        public const string Decay = "decay";
        public const string Alive = "alive";
        public const string Done = "done";
        public const string Halted = "halted";
        public const string Fault = "fault";
    }

    /// <summary>How a sweep or a series of rings ended (the last field of <c>done</c>).</summary>
    public static class Ending
    {
        public const int Complete = 0;
        public const int Halted = 1;
        public const int Faulted = 2;
    }

    /// <summary>The order in which a sweep takes the settings of the plan.</summary>
    public static class SweepOrder
    {
        public const int AsPlanned = 0;
        public const int Reversed = 1;

        /// <summary>Through the plan and back again, each setting twice: a steady drift cancels to first order.</summary>
        public const int ThereAndBack = 2;
    }

    /// <summary>The pickup's inputs.</summary>
    public static class Channel
    {
        /// <summary>The envelope detector.</summary>
        public const int Detector = 0;

        /// <summary>The buffered waveform itself, where the box has that input.</summary>
        public const int Direct = 1;

        /// <summary>A thermistor divider, where the box has that input.</summary>
        public const int Thermistor = 2;

        public const int Count = 3;
    }

    /// <summary>Bounds that both ends keep.</summary>
    public static class WireLimits
    {
        /// <summary>Longest line from a host, its newline included: two of them fit the board's receive ring of 256 bytes.</summary>
        public const int HostLineBytes = 120;

        /// <summary>Longest line from a box, its newline included.</summary>
        public const int BoxLineBytes = 250;

        public const int LastRequestNumber = 65535;
        public const int LastLineNumber = 65535;

        /// <summary>Below this, nothing may be driven whatever the limits say. Vernier settings lie just above it.</summary>
        public const int LowestHz = 8000;
        public const int HighestHz = 1000000;

        /// <summary>Runs and single settings that one plan holds.</summary>
        public const int PlanEntries = 320;

        /// <summary>Points of one sweep, both ways of <see cref="SweepOrder.ThereAndBack"/> counted.</summary>
        public const int SweepPoints = 4096;
        public const int SamplesPerPoint = 16384;
        public const int LongestDwellUs = 2000000;
        public const int LongestSpacingUs = 1000000;
        public const int LongestDarkMs = 60000;

        public const int PointsPerPack = 12;
        public const int RingSamples = 64;
        public const int RingRepeats = 1000;
        public const int LongestRingDelayUs = 1000000;
        public const int PairsPerDecay = 15;

        /// <summary>Highest pedestal that a host may declare, raw counts: more would blind the interlock.</summary>
        public const int HighestPedestalCounts = 1500;

        /// <summary>The drive is off this long after the last valid line from the host, at the latest.</summary>
        public const int HostSilenceMs = 2000;

        /// <summary>While it works on a request the box says something at least this often.</summary>
        public const int AliveMs = 50;

        /// <summary>The look for a foreign field before the first drive: the largest sample of this long.</summary>
        public const int LongLookMs = 1000;

        /// <summary>A pause in driving after which the long look is due again.</summary>
        public const int LongLookAfterMs = 10000;

        /// <summary>The look before each sweep otherwise.</summary>
        public const int ShortLookMs = 6;

        /// <summary>How long the own ring may take to die before what is left counts as a foreign field.</summary>
        public const int RingOutMs = 200;
    }

    /// <summary>Why a request was not done, or why driving stopped. PROTOCOL.md says what to do about each.</summary>
    public static class FaultCode
    {
        public const int None = 0;
        public const int UnreadableLine = 1;
        public const int UnknownVerb = 2;
        public const int BadFields = 3;
        public const int OutsideLimits = 4;
        public const int PlanFull = 5;
        public const int PlanEmpty = 6;
        public const int FieldPresent = 7;
        public const int HostSilent = 8;
        public const int PickupFailed = 9;
        public const int DriveFailed = 10;
        public const int LineTooLong = 11;
        public const int Busy = 12;
        public const int PickupBelowRange = 13;
        public const int NoSuchInput = 14;
        public const int Internal = 15;
        public const int Last = 15;

        /// <summary>The text that stands behind the code on the wire: words joined by hyphens, so that it is one field.</summary>
        public static string Text(int code)
        {
            switch (code)
            {
                case UnreadableLine: return "unreadable-line";
                case UnknownVerb: return "unknown-verb";
                case BadFields: return "bad-fields";
                case OutsideLimits: return "outside-limits";
                case PlanFull: return "plan-full";
                case PlanEmpty: return "plan-empty";
                case FieldPresent: return "field-present";
                case HostSilent: return "host-silent";
                case PickupFailed: return "pickup-failed";
                case DriveFailed: return "drive-failed";
                case LineTooLong: return "line-too-long";
                case Busy: return "busy";
                case PickupBelowRange: return "pickup-below-range";
                case NoSuchInput: return "no-such-input";
                default: return "internal";
            }
        }
    }
}
