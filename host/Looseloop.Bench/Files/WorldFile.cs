using Tomlyn.Parsing;
using Tomlyn.Syntax;

namespace Looseloop.Bench.Files;

/// <summary>Reads a world from TOML. Every key has the name of the property it sets; a key that is not known is refused.</summary>
internal sealed class WorldFile
{
    private static readonly string[] _single =
        ["coil", "loop", "drive", "pickup", "feed_through", "room", "hum", "bursts", "warm_up", "detector", "converter", "board"];

    private static readonly string[] _several = ["mode", "neighbour", "carrier"];

    private readonly string _file;
    private readonly DocumentSyntax _document;

    private WorldFile(string file, string text)
    {
        _file = file;
        _document = SyntaxParser.Parse(text, file, true);
        foreach (DiagnosticMessage message in _document.Diagnostics)
        {
            throw new WorldFileException($"{_file}, line {message.Span.Start.Line + 1}: {message.Message.TrimEnd('.')}.");
        }

        foreach (TableSyntaxBase table in _document.Tables)
        {
            string name = NameOf(table);
            string[] known = table is TableArraySyntax ? _several : _single;
            if (!known.Contains(name))
            {
                string advice = _several.Contains(name) ? $" (write it as [[{name}]])"
                    : _single.Contains(name) ? $" (write it as [{name}])" : "";
                throw new WorldFileException($"{_file}, line {table.Span.Start.Line + 1}: a world has no section '{name}'{advice}.");
            }
        }
    }

    /// <summary>Reads a world.</summary>
    /// <param name="file">The file's name as the user knows it, for messages.</param>
    /// <param name="name">The world's short name.</param>
    /// <param name="text">The file's text.</param>
    /// <exception cref="WorldFileException">Something in it cannot be used.</exception>
    public static World Read(string file, string name, string text) => new WorldFile(file, text).World(name);

    private World World(string name)
    {
        var top = new WorldSection(_file, "the file's head", _document.KeyValues);
        string about = top.Text("about", "").Trim();
        top.Done();
        return new World
        {
            Name = name,
            About = about,
            Coil = Coil(),
            Loop = One("loop", new DriveLoop(), (section, ordinary) => new DriveLoop
            {
                Coupling = section.Number("coupling", ordinary.Coupling, 1e-6, 0.5),
                InductanceUh = section.Number("inductance_uh", ordinary.InductanceUh, 0.01, 1e4),
                ResistanceOhm = section.Number("resistance_ohm", ordinary.ResistanceOhm, 1e-3, 1e5),
            }),
            Drive = One("drive", new DriveStage(), (section, ordinary) => new DriveStage
            {
                SwingVolts = section.Number("swing_volts", ordinary.SwingVolts, 0, 1000),
                Harmonics = section.Whole("harmonics", ordinary.Harmonics, 1, 40),
                RiseNs = section.Number("rise_ns", ordinary.RiseNs, 0, 1000),
                FallNs = section.Number("fall_ns", ordinary.FallNs, 0, 1000),
                HighExtraNs = section.Number("high_extra_ns", ordinary.HighExtraNs, -1000, 1000),
            }),
            Pickup = One("pickup", new PickupAntenna(), (section, ordinary) => new PickupAntenna
            {
                CouplingPf = section.Number("coupling_pf", ordinary.CouplingPf, 0, 100),
                InputPf = section.Number("input_pf", ordinary.InputPf, 0.1, 1e4),
                Gain = section.Number("gain", ordinary.Gain, 0, 1e6),
                PullPfPerPf = section.Number("pull_pf_per_pf", ordinary.PullPfPerPf, 0, 100),
                Senses = section.Choice("senses", ordinary.Senses, ("voltage", PickupSense.Voltage), ("current", PickupSense.Current)),
            }),
            FeedThrough = One("feed_through", new FeedThrough(), (section, ordinary) => new FeedThrough
            {
                Fraction = section.Number("fraction", ordinary.Fraction, 0, 100),
                PhaseDeg = section.Number("phase_deg", ordinary.PhaseDeg, -360, 360),
                Transfer = section.Choice(
                    "transfer",
                    ordinary.Transfer,
                    ("flat", FeedThroughTransfer.Flat),
                    ("rising", FeedThroughTransfer.Rising),
                    ("pole", FeedThroughTransfer.Pole)),
                PoleHz = section.Number("pole_hz", ordinary.PoleHz, 1, 1e9),
            }),
            Room = Room(),
            Detector = One("detector", new DetectorParameters(), Detector),
            Converter = One("converter", new ConverterParameters(), (section, ordinary) => new ConverterParameters
            {
                FullScaleVolts = section.Number("full_scale_volts", ordinary.FullScaleVolts, 0.1, 100),
                DeadZoneVolts = section.Number("dead_zone_volts", ordinary.DeadZoneVolts, 0, 100),
                NoiseCounts = section.Number("noise_counts", ordinary.NoiseCounts, 0, 4095),
                NoiseOfLevel = section.Number("noise_of_level", ordinary.NoiseOfLevel, 0, 1),
                BowCounts = section.Number("bow_counts", ordinary.BowCounts, -1000, 1000),
                RippleCounts = section.Number("ripple_counts", ordinary.RippleCounts, -1000, 1000),
                RipplePeriodCounts = section.Number("ripple_period_counts", ordinary.RipplePeriodCounts, 1, 1e6),
            }),
            Board = One("board", new BoardParameters(), Board),
        };
    }

    private VirtualCoil Coil()
    {
        var ordinary = new VirtualCoil();
        List<CoilMode> modes = Each("mode", section => new CoilMode(section.Needed("f0_hz", 1000, 1e7), section.Needed("q", 2, 1e7))
        {
            LoopShare = section.Number("loop_share", 1, -100, 100),
            PickupShare = section.Number("pickup_share", 1, -100, 100),
            TopShare = section.Number("top_share", 1, 0, 100),
        });
        return One("coil", ordinary, (section, _) => new VirtualCoil
        {
            InductanceMh = section.Number("inductance_mh", ordinary.InductanceMh, 1e-3, 1e5),
            Modes = modes.Count > 0 ? modes : ordinary.Modes,
        });
    }

    private Room Room()
    {
        List<Neighbour> neighbours = Each("neighbour", section => new Neighbour
        {
            F0Hz = section.Number("f0_hz", 0, 0, 1e7),
            Q = section.Number("q", 50, 0.1, 1e7),
            CouplingToCoil = section.Number("coupling_to_coil", 0, -0.7, 0.7),
            CouplingToLoop = section.Number("coupling_to_loop", 0, -0.7, 0.7),
            PickupShare = section.Number("pickup_share", 0, -100, 100),
        });
        List<Carrier> carriers = Each("carrier", section => new Carrier
        {
            FrequencyHz = section.Needed("frequency_hz", 1, 1e8),
            Volts = section.Needed("volts", 0, 1000),
            PeriodS = section.Number("period_s", 0, 0, 3600),
            OnS = section.Number("on_s", 0, 0, 3600),
            FromS = section.Number("from_s", 0),
            ToS = section.Number("to_s", double.PositiveInfinity, 0, double.PositiveInfinity),
        });
        return One("room", new Room(), (section, ordinary) => new Room
        {
            PeoplePf = section.Number("people_pf", ordinary.PeoplePf, 0, 100),
            CablePf = section.Number("cable_pf", ordinary.CablePf, 0, 100),
            TemperatureC = section.Number("temperature_c", ordinary.TemperatureC, -40, 85),
            Neighbours = neighbours,
            Carriers = carriers,
            Hum = One("hum", new MainsHum(), (hum, usual) => new MainsHum
            {
                FrequencyHz = hum.Number("frequency_hz", usual.FrequencyHz, 1, 1000),
                OutputMv = hum.Number("output_mv", usual.OutputMv, 0, 5000),
                SecondShare = hum.Number("second_share", usual.SecondShare, 0, 1),
                Modulation = hum.Number("modulation", usual.Modulation, 0, 1),
            }),
            Bursts = One("bursts", new Bursts(), (bursts, usual) => new Bursts
            {
                PerSecond = bursts.Number("per_second", usual.PerSecond, 0, 1e5),
                OutputMv = bursts.Number("output_mv", usual.OutputMv, 0, 5000),
                LengthUs = bursts.Number("length_us", usual.LengthUs, 1, 1e6),
            }),
            WarmUp = One("warm_up", new WarmUp(), (warmUp, usual) => new WarmUp
            {
                StartPpm = warmUp.Number("start_ppm", usual.StartPpm, -1e5, 1e5),
                TimeS = warmUp.Number("time_s", usual.TimeS, 0.01, 1e6),
                PpmPerHour = warmUp.Number("ppm_per_hour", usual.PpmPerHour, -1e8, 1e8),
                StartQPercent = warmUp.Number("start_q_percent", usual.StartQPercent, -90, 1000),
                QPercentPerHour = warmUp.Number("q_percent_per_hour", usual.QPercentPerHour, -1e6, 1e6),
            }),
        });
    }

    // What is left out is that of an ordinary detector of the kind.
    private static DetectorParameters Detector(WorldSection section, DetectorParameters usual)
    {
        DetectorKind kind = section.Choice(
            "kind",
            usual.Kind,
            ("rms_linear", DetectorKind.RmsLinear),
            ("rms_log", DetectorKind.RmsLog),
            ("square", DetectorKind.Square),
            ("mean_absolute", DetectorKind.MeanAbsolute),
            ("logarithm", DetectorKind.Logarithm),
            ("diode", DetectorKind.Diode),
            ("peak", DetectorKind.Peak),
            ("peak_to_peak", DetectorKind.PeakToPeak));
        var ordinary = DetectorParameters.Of(kind);
        return new DetectorParameters
        {
            Kind = kind,
            TimeConstantUs = section.Number("time_constant_us", ordinary.TimeConstantUs, 0, 1e6),
            DecayUs = section.Number("decay_us", ordinary.DecayUs, 0, 1e6),
            Gain = section.Number("gain", ordinary.Gain, 1e-6, 1e6),
            MvPerDb = section.Number("mv_per_db", ordinary.MvPerDb, 0.1, 1000),
            InterceptDbV = section.Number("intercept_dbv", ordinary.InterceptDbV, -200, 20),
            DiodeMv = section.Number("diode_mv", ordinary.DiodeMv, 1, 1000),
            FloorMv = section.Number("floor_mv", ordinary.FloorMv, 0, 1000),
            OutputNoiseMv = section.Number("output_noise_mv", ordinary.OutputNoiseMv, 0, 1000),
            PedestalVolts = section.Number("pedestal_volts", ordinary.PedestalVolts, 0, 10),
            CeilingVolts = section.Number("ceiling_volts", ordinary.CeilingVolts, 0.1, 100),
        };
    }

    private static BoardParameters Board(WorldSection section, BoardParameters ordinary) => new()
    {
        MostDutyBits = section.Choice("timer", ordinary.MostDutyBits, ("esp32", 19), ("esp32s3", 13)),
        ClockPpm = section.Number("clock_ppm", ordinary.ClockPpm, -1e4, 1e4),
        ReadUs = section.Number("read_us", ordinary.ReadUs, 1, 1e5),
        ReadJitterUs = section.Number("read_jitter_us", ordinary.ReadJitterUs, 0, 1e4),
        SetUs = section.Number("set_us", ordinary.SetUs, 0, 1e5),
        StartStopUs = section.Number("start_stop_us", ordinary.StartStopUs, 0, 1e5),
        NowUs = section.Number("now_us", ordinary.NowUs, 0.1, 1e4),
        SendUsPerByte = section.Number("send_us_per_byte", ordinary.SendUsPerByte, 0, 1e4),
        ReceiveUsPerByte = section.Number("receive_us_per_byte", ordinary.ReceiveUsPerByte, 0, 1e4),
        PollUs = section.Number("poll_us", ordinary.PollUs, 0.1, 1e4),
        WaitLateUs = section.Number("wait_late_us", ordinary.WaitLateUs, 0, 1e4),
        Baud = section.Whole("baud", ordinary.Baud, 300, 10_000_000),
        HasDirect = section.Flag("has_direct", ordinary.HasDirect),
        HasThermistor = section.Flag("has_thermistor", ordinary.HasThermistor),
    };

    private T One<T>(string name, T ordinary, Func<WorldSection, T, T> read)
    {
        TableSyntaxBase? found = _document.Tables.FirstOrDefault(table => NameOf(table) == name);
        var section = new WorldSection(_file, $"[{name}]", found?.Items);
        T value = read(section, ordinary);
        section.Done();
        return value;
    }

    private List<T> Each<T>(string name, Func<WorldSection, T> read)
    {
        var all = new List<T>();
        foreach (TableSyntaxBase table in _document.Tables.Where(table => NameOf(table) == name))
        {
            var section = new WorldSection(_file, $"[[{name}]]", table.Items);
            all.Add(read(section));
            section.Done();
        }

        return all;
    }

    private static string NameOf(TableSyntaxBase table) => table.Name?.ToString().Trim() ?? "";
}
