namespace Looseloop.Firmware
{
    /// <summary>Time since the board started, which never runs backwards.</summary>
    public interface IClock
    {
        long NowUs();

        /// <summary>Returns when <see cref="NowUs"/> has reached a time. Exact to some microseconds: settling depends on it.</summary>
        void WaitUntilUs(long timeUs);
    }
}
