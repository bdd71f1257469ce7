using System;
using System.Device.Pwm;
using nanoFramework.Hardware.Esp32;

namespace Looseloop.Firmware
{
    /// <summary>The drive pin on a PWM channel.</summary>
    public sealed class PwmExcitation : IExcitation
    {
        private readonly PwmChannel _channel;

        public PwmExcitation(int pin)
        {
            Configuration.SetPinFunction(pin, DeviceFunction.PWM1);
            _channel = PwmChannel.CreateFromPin(pin, 40000, 0.5);
            if (_channel == null)
            {
                throw new InvalidOperationException("no PWM on the drive pin");
            }
        }

        public void Set(int requestHz, double askedDuty)
        {
            // A new frequency may come with other duty bits, so the duty is always set again. It is never 0: the runtime
            // may only store what follows a 0.
            _channel.Frequency = requestHz;
            _channel.DutyCycle = askedDuty;
        }

        public void Start()
        {
            _channel.Start();
        }

        // Not Dispose, which leaves the output running.
        public void Stop()
        {
            _channel.Stop();
        }
    }
}
