using System;
using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>The drive pin with its failures turned into faults, and a memory of whether it may still be running.</summary>
    internal sealed class Drive
    {
        private readonly IExcitation _excitation;

        public Drive(IExcitation excitation)
        {
            _excitation = excitation;
        }

        /// <summary>True from just before a start until a stop has succeeded.</summary>
        public bool MayRun { get; private set; }

        /// <summary>True if the last stop failed: it is then tried again, and nothing may start.</summary>
        public bool IsUnsure { get; private set; }

        public void Set(int dutyBits, int divider, int dutyCount)
        {
            try
            {
                _excitation.Set(FrequencyGrid.RequestHz(dutyBits, divider), FrequencyGrid.AskedDuty(dutyCount, dutyBits));
            }
            catch (Exception)
            {
                throw new BoxFault(FaultCode.DriveFailed);
            }
        }

        public void Start()
        {
            MayRun = true;
            try
            {
                _excitation.Start();
            }
            catch (Exception)
            {
                throw new BoxFault(FaultCode.DriveFailed);
            }
        }

        /// <returns>False if the runtime refused: the pin may still be driven.</returns>
        public bool Stop()
        {
            try
            {
                _excitation.Stop();
                MayRun = false;
                IsUnsure = false;
            }
            catch (Exception)
            {
                IsUnsure = true;
            }

            return !IsUnsure;
        }
    }
}
