using System.Text.Json;
using Looseloop.Procedures.Ladder;

namespace Looseloop.Rendering;

/// <summary>A ladder as JSON.</summary>
internal static class LadderJson
{
    public static void Write(Utf8JsonWriter json, LadderOutcome outcome, bool kept)
    {
        json.WriteBoolean("kept", kept);
        json.WriteString("kind", outcome.Law?.Kind.ToString());
        if (outcome.At is { } at)
        {
            json.Figure("frequency_hz", at.FrequencyHz);
        }

        json.Figure("detuning_half_bandwidths", outcome.Detuning);
        if (outcome.Law is { } law)
        {
            json.Figure("pedestal_counts", law.PedestalCounts);
            json.Figure("pedestal_u_counts", law.PedestalUncertainty);
            json.Figure("shape", law.Shape);
            json.Figure("shape_u", law.ShapeUncertainty);
            json.Figure("bow_bound", law.BowBound);
            json.Figure("high_extra_s", law.HighExtraS);
            json.Figure("high_extra_u_s", law.HighExtraUncertaintyS);
        }

        json.Objects("tried", outcome.Choice?.All ?? [], fit =>
        {
            json.WriteString("kind", fit.Law.Kind.ToString());
            json.Figure("chi_square", fit.ChiSquare);
            json.WriteNumber("degrees_of_freedom", fit.DegreesOfFreedom);
        });
        if (outcome.Direct is { } direct)
        {
            json.Figure("direct_difference", direct.Difference);
            json.Figure("direct_u", direct.Uncertainty);
        }

        json.Objects("rungs", outcome.Rungs?.Points ?? [], point =>
        {
            json.Figure("duty", point.Setting.Duty);
            json.Figure("mean_counts", point.Mean);
        });
        json.Objects("reasons", outcome.Reasons, reason =>
        {
            json.WriteString("code", reason.Name);
            json.WriteString("detail", reason.Detail);
            json.WriteString("advice", reason.Advice);
        });
        json.Figure("board_s", outcome.BoardSeconds);
    }
}
