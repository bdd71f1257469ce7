namespace Looseloop.Procedures.Clock;

/// <summary>The same moment by both clocks, as nearly as the line allows.</summary>
/// <param name="HostS">The host's clock as it asked, seconds: answers grow longer with the board's time, questions hardly do.</param>
/// <param name="BoardS">The board's clock as it began to answer, seconds.</param>
/// <param name="RoundTripS">From question to answer, seconds.</param>
public readonly record struct ClockPair(double HostS, double BoardS, double RoundTripS);
