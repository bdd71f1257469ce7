using Looseloop.Readings;

namespace Looseloop.Procedures.Tests.Read;

public class ReasonTextTests
{
    [Fact]
    public void Every_reason_has_a_name_a_verdict_and_a_line_of_advice()
    {
        foreach (ReasonCode code in Enum.GetValues<ReasonCode>())
        {
            Assert.Matches("^[a-z0-9]+(-[a-z0-9]+)*$", ReasonText.Name(code));
            Assert.EndsWith(".", ReasonText.Advice(code));
            Assert.True(Enum.IsDefined(ReasonText.AtBest(code)));
        }
    }
}
