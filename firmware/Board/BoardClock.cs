using nanoFramework.Hardware.Esp32;

namespace Looseloop.Firmware
{
    /// <summary>The chip's microsecond timer, and waiting by looking at it: sleeping is only exact to 10 ms.</summary>
    public sealed class BoardClock : IClock
    {
        public long NowUs()
        {
            return (long)HighResTimer.GetCurrent();
        }

        public void WaitUntilUs(long timeUs)
        {
            while ((long)HighResTimer.GetCurrent() < timeUs)
            {
            }
        }
    }
}
