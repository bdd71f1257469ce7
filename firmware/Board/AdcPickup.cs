using System.Device.Adc;
using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>The converter's inputs: raw one-shot conversions.</summary>
    public sealed class AdcPickup : IPickup
    {
        private readonly AdcChannel[] _inputs = new AdcChannel[Channel.Count];

        public AdcPickup(PinMap pins)
        {
            var controller = new AdcController();
            Open(controller, Channel.Detector, pins.DetectorChannel);
            Open(controller, Channel.Direct, pins.DirectChannel);
            Open(controller, Channel.Thermistor, pins.ThermistorChannel);
        }

        public bool Has(int channel)
        {
            return _inputs[channel] != null;
        }

        public int Read(int channel)
        {
            return _inputs[channel].ReadValue();
        }

        private void Open(AdcController controller, int channel, int adcChannel)
        {
            if (adcChannel != PinMap.NotFitted)
            {
                _inputs[channel] = controller.OpenChannel(adcChannel);
            }
        }
    }
}
