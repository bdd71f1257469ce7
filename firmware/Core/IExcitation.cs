namespace Looseloop.Firmware
{
    /// <summary>The drive pin. Any member may throw; Core then stops the drive and says so.</summary>
    public interface IExcitation
    {
        /// <summary>Sets the frequency, then the duty, while stopped or running.</summary>
        /// <param name="requestHz">Whole hertz to ask of the runtime.</param>
        /// <param name="askedDuty">Duty to ask of the runtime, 0..1.</param>
        void Set(int requestHz, double askedDuty);

        /// <summary>Starts the output with what was set last.</summary>
        void Start();

        /// <summary>Stops the output; the pin rests low. Allowed at any time.</summary>
        void Stop();
    }
}
