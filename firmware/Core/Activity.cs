namespace Looseloop.Firmware
{
    /// <summary>Work that takes longer than one step: a `dark`, a `sweep` or a `ring`.</summary>
    internal abstract class Activity
    {
        /// <summary>The number of the request that asked for it.</summary>
        public int Request { get; protected set; }

        /// <summary>True once nothing is left to do; everything has then been said.</summary>
        public bool IsFinished { get; protected set; }

        /// <summary>True if it may drive, so that it ends when the host falls silent.</summary>
        public abstract bool Drives { get; }

        /// <summary>Does one piece of the work, hardly past a time.</summary>
        public abstract void Advance(long untilUs);

        /// <summary>Stops at once and says so.</summary>
        /// <param name="ending">Halted or Faulted of Protocol.Ending.</param>
        /// <param name="code">The fault, if one ended it.</param>
        public abstract void EndEarly(int ending, int code);
    }
}
