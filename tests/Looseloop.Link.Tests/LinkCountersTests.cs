namespace Looseloop.Link.Tests;

public sealed class LinkCountersTests
{
    [Fact]
    public void Gaps_in_the_line_count_are_missing_lines_also_over_its_end()
    {
        var counters = new LinkCounters();
        Assert.Equal(0, counters.CountReceivedLine(65530));
        Assert.Equal(0, counters.CountReceivedLine(65531));
        Assert.Equal(2, counters.CountReceivedLine(65534));
        Assert.Equal(2, counters.CountReceivedLine(1));
        Assert.Equal(4, counters.MissingLines);
        Assert.Equal(4, counters.LinesReceived);
    }

    [Fact]
    public void A_count_that_steps_back_is_a_restart_not_a_loss()
    {
        var counters = new LinkCounters();
        counters.CountReceivedLine(500);
        Assert.Equal(0, counters.CountReceivedLine(0));
        Assert.Equal(0, counters.CountReceivedLine(1));
        counters.CountReconnect();
        Assert.Equal(0, counters.CountReceivedLine(400));
        counters.ExpectAnyLine();
        Assert.Equal(0, counters.CountReceivedLine(900));
        Assert.Equal(0, counters.MissingLines);
        Assert.Equal(1, counters.Reconnects);
    }

    [Fact]
    public void Everything_is_counted_where_it_belongs()
    {
        var counters = new LinkCounters();
        counters.CountSent(30, 2);
        counters.CountSent(12, 1);
        counters.CountReceivedBytes(7);
        counters.CountBadLine();
        counters.CountRetry();
        counters.CountRetry();
        Assert.Equal((42, 3, 7), (counters.BytesSent, counters.LinesSent, counters.BytesReceived));
        Assert.Equal((1, 2, 0), (counters.BadLines, counters.Retries, counters.LinesReceived));
    }
}
