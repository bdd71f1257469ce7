namespace Looseloop.Firmware
{
    /// <summary>The converter's inputs.</summary>
    public interface IPickup
    {
        /// <summary>True if the box has this input (see Protocol.Channel).</summary>
        bool Has(int channel);

        /// <summary>One raw conversion, 0..4095. May throw.</summary>
        int Read(int channel);
    }
}
