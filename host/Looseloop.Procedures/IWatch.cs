namespace Looseloop.Procedures;

/// <summary>Someone who follows a procedure while it runs.</summary>
public interface IWatch
{
    /// <summary>A part of the procedure begins.</summary>
    /// <param name="task">What it is, in the field's words.</param>
    /// <param name="boardSeconds">How long it will take by the box's clock, about; 0 where that is not known.</param>
    void Begin(string task, double boardSeconds);

    /// <summary>A share of it is done, 0..1.</summary>
    void Progress(double share);
}

/// <summary>Nobody watches.</summary>
public sealed class NoWatch : IWatch
{
    public static readonly NoWatch Instance = new();

    public void Begin(string task, double boardSeconds)
    {
    }

    public void Progress(double share)
    {
    }
}
