using Looseloop.Procedures.SetUp;

namespace Looseloop.Procedures.Tests.SetUp;

public class SetUpTests
{
    [Fact]
    public void What_is_stated_anew_replaces_the_old_and_the_rest_stays()
    {
        IReadOnlyDictionary<string, string> one = SetUpFields.With(
            new Dictionary<string, string>(), [new("top load", "toroid 300x80"), new("primary", "absent")]);
        IReadOnlyDictionary<string, string> two = SetUpFields.With(one, [new("primary", "open"), new("top load", "")]);
        Assert.Equal("open", two["primary"]);
        Assert.False(two.ContainsKey("top load"));
        Assert.Equal(5, SetUpFields.Unstated(two).Count);
        Assert.Equal("absent", one["primary"]);
    }

    [Fact]
    public void A_primary_is_absent_open_or_shorted()
    {
        ArgumentException error = Assert.Throws<ArgumentException>(() =>
            SetUpFields.With(new Dictionary<string, string>(), [new("primary", "maybe")]));
        Assert.Contains("shorted", error.Message);
    }

    [Fact]
    public void Moving_the_cable_is_always_advised() =>
        Assert.Contains(SetUpFields.Advice(new Dictionary<string, string>()), text => text.Contains("cable", StringComparison.Ordinal));
}
