namespace System.Device.Adc
{
    public abstract class AdcChannelBase
    {
        public AdcController Controller
        {
            get { return null; }
        }

        public abstract int ReadValue();

        public double ReadRatio()
        {
            return 0;
        }
    }

    /// <summary>The shape of the library's class, for the check build. The board has the real one.</summary>
    public class AdcChannel : AdcChannelBase, IDisposable
    {
        internal AdcChannel()
        {
        }

        public override int ReadValue()
        {
            return 0;
        }

        public void Dispose()
        {
        }
    }
}
