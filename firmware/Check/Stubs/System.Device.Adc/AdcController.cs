using System.Reflection;

[assembly: AssemblyVersion("1.1.24.44037")]

namespace System.Device.Adc
{
    public enum AdcChannelMode
    {
        SingleEnded = 0,
        Differential,
    }

    public abstract class AdcControllerBase
    {
        public abstract int ChannelCount { get; }

        public abstract int MaxValue { get; }

        public abstract int MinValue { get; }

        public abstract int ResolutionInBits { get; }

        public abstract AdcChannelMode ChannelMode { get; set; }

        public abstract bool IsChannelModeSupported(AdcChannelMode channelMode);

        public abstract AdcChannel OpenChannel(int channelNumber);
    }

    /// <summary>The shape of the library's class, for the check build. The board has the real one.</summary>
    public class AdcController : AdcControllerBase
    {
        public override int ChannelCount
        {
            get { return 0; }
        }

        public override int MaxValue
        {
            get { return 0; }
        }

        public override int MinValue
        {
            get { return 0; }
        }

        public override int ResolutionInBits
        {
            get { return 0; }
        }

        public override AdcChannelMode ChannelMode { get; set; }

        public override bool IsChannelModeSupported(AdcChannelMode channelMode)
        {
            return false;
        }

        public override AdcChannel OpenChannel(int channelNumber)
        {
            return null;
        }
    }
}
