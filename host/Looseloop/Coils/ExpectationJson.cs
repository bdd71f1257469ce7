using System.Text.Json;
using Looseloop.Coil;
using Looseloop.Rendering;

namespace Looseloop.Coils;

/// <summary>An expectation as JSON.</summary>
internal static class ExpectationJson
{
    public static void Write(Utf8JsonWriter json, CoilExpectation e, Comparison? comparison, FrequencySource? source)
    {
        json.WriteNumber("schema_version", 1);
        json.WriteString("coil", e.Coil.Name);
        json.Figure("f1_hz", e.F1Hz);
        json.Figure("f1_standard_hz", e.F1UncertaintyHz);
        json.Figure("inductance_direct_h", e.DirectInductanceH);
        json.Figure("inductance_filaments_h", e.FilamentInductanceH);
        json.Figure("capacitance_equivalent_f", e.EquivalentCapacitanceF);
        json.Figure("capacitance_top_f", e.Modes[0].TopCapacitanceF);
        json.Figure("inductance_top_h", e.Modes[0].TopInductanceH);
        json.Figure("base_current_a_per_v", e.Modes[0].BaseCurrentPerVolt);
        json.Figure("f1_per_kelvin", e.F1PerKelvin);
        json.Figure("q_per_kelvin", CoilExpectation.QPerKelvin);
        json.WriteStartObject("q_at_most");
        json.Figure("low", e.Q.Low);
        json.Figure("high", e.Q.High);
        json.Figure("skin_only", e.Q.SkinOnly);
        json.Figure("dowell", e.Q.Dowell);
        json.Figure("medhurst_times_skin", e.Q.MedhurstTimesSkin);
        json.Figure("medhurst_thin_skin", e.Q.MedhurstThinSkin);
        json.Figure("wire_direct_ohm", e.Q.DirectOhm);
        json.WriteEndObject();
        json.Objects("modes", e.Modes, m =>
        {
            json.Figure("frequency_hz", m.FrequencyHz);
            json.Figure("over_f1", m.FrequencyHz / e.F1Hz);
        });
        json.Objects("contributions", e.Contributions, c =>
        {
            json.WriteString("name", c.Name);
            json.Figure("f1_standard_hz", c.UncertaintyHz);
            json.WriteString("origin", c.Origin);
        });
        json.Objects("sensitivities", e.Sensitivities, s =>
        {
            json.WriteString("key", s.Dimension.Path);
            json.Figure("value", s.Dimension.Value);
            json.WriteString("unit", s.Dimension.Unit);
            json.Figure("f1_percent_per_percent", s.RelativePerPercent);
            json.Figure("f1_hz_per_unit", s.HzPerUnit);
            json.Figure("tolerance", s.Tolerance);
            json.WriteBoolean("tolerance_stated", s.Stated);
        });
        json.Objects("profile", Enumerable.Range(0, e.Modes[0].HeightM.Count), i =>
        {
            json.Figure("height_mm", e.Modes[0].HeightM[i] * 1e3);
            json.Figure("voltage_over_top", e.Modes[0].Voltage[i]);
        });
        if (comparison is not null)
        {
            Write(json, comparison, source!);
        }

        Cautions.Write(json, CoilExpectation.Caution);
    }

    private static void Write(Utf8JsonWriter json, Comparison c, FrequencySource source)
    {
        json.WriteStartObject("against");
        json.WriteString("from", source.From);
        json.WriteString("verdict", source.Verdict.ToString().ToLowerInvariant());
        json.Figure("f0_hz", c.ReadHz);
        json.Figure("f0_absolute_standard_hz", source.AbsoluteHz);
        json.Figure("q", source.Q);
        json.Figure("relative_difference", c.Relative);
        json.Figure("z", c.Z);
        json.WriteBoolean("within_uncertainty", c.WithinUncertainty);
        json.Objects("causes", c.Causes, cause =>
        {
            json.WriteString("name", cause.Name);
            json.WriteBoolean("can_account", cause.CanAccount);
            json.Figure("from", cause.From);
            json.Figure("to", cause.To);
            json.WriteString("unit", cause.Unit);
            json.WriteString("remark", cause.Remark);
        });
        json.WriteEndObject();
    }
}
