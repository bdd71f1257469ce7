using System.Reflection;

[assembly: AssemblyVersion("1.1.23.36628")]

namespace System.Device.Pwm
{
    public enum PwmPulsePolarity
    {
        ActiveHigh,
        ActiveLow,
    }

    /// <summary>The shape of the library's class, for the check build. The board has the real one.</summary>
    public sealed class PwmChannel : IDisposable
    {
        public PwmChannel(int chip, int channel, int frequency = 400, double dutyCyclePercentage = 0.5)
        {
        }

        public int Frequency { get; set; }

        public double DutyCycle { get; set; }

        public static PwmChannel Create(int chip, int channel, int frequency = 400, double dutyCyclePercentage = 0.5)
        {
            return null;
        }

        public static PwmChannel CreateFromPin(int pin, int frequency = 400, double dutyCyclePercentage = 0.5)
        {
            return null;
        }

        public void Start()
        {
        }

        public void Stop()
        {
        }

        public void Dispose()
        {
        }
    }
}
