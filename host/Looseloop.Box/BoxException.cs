namespace Looseloop.Box;

/// <summary>What went wrong with a box that is otherwise connected.</summary>
public enum BoxTrouble
{
    /// <summary>Nothing on the link answers as a box.</summary>
    NoAnswer,

    /// <summary>It answers, but in another version of the protocol.</summary>
    OtherProtocol,

    /// <summary>The box refused or stopped, with a fault code.</summary>
    Fault,

    /// <summary>The box has restarted since it was identified: its plan and limits are gone.</summary>
    Restarted,

    /// <summary>The box fell silent in the middle of its work.</summary>
    FellSilent,
}

/// <summary>A request to a box that was not fulfilled. The message says what happened and what to do.</summary>
public sealed class BoxException : Exception
{
    public BoxException(BoxTrouble trouble, string message)
        : base(message) => Trouble = trouble;

    /// <summary>A fault that the box reported.</summary>
    public BoxException(int faultCode)
        : base(FaultAdvice.Sentence(faultCode))
    {
        Trouble = BoxTrouble.Fault;
        FaultCode = faultCode;
    }

    public BoxTrouble Trouble { get; }

    /// <summary>The fault code, or 0 where the box gave none.</summary>
    public int FaultCode { get; } = Protocol.FaultCode.None;

    /// <summary>True if the box refused to drive because a foreign field is present.</summary>
    public bool FieldPresent => FaultCode == Protocol.FaultCode.FieldPresent;
}
