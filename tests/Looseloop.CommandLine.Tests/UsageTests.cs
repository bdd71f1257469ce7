namespace Looseloop.CommandLine.Tests;

public class UsageTests
{
    [Theory]
    [InlineData("boxes", "--foo")]
    [InlineData("no-such-command")]
    [InlineData]
    public void A_wrong_command_line_is_exit_code_2_with_a_sentence_and_nothing_on_the_output(params string[] args)
    {
        AppRun run = AppRun.Of(args);
        Assert.Equal(2, run.ExitCode);
        Assert.Empty(run.Out);
        Assert.StartsWith("looseloop: ", run.Error);
        Assert.DoesNotContain("   at ", run.Error);
    }

    [Fact]
    public void Help_goes_to_the_output()
    {
        AppRun run = AppRun.Of("--help");
        Assert.Equal(0, run.ExitCode);
        Assert.Contains("boxes", run.Out);
        Assert.Empty(run.Error);
    }
}
