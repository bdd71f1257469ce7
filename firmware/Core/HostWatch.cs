using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Notices that the host has fallen silent.</summary>
    internal sealed class HostWatch
    {
        // The drive must be off and the fault sent by HostSilenceMs, counted from the host's end of the wire: this leaves
        // room for a line that waited in the receive ring, a step in progress and one long line on its way out.
        private const int MarginMs = 150;
        private const long LongestSilenceUs = (WireLimits.HostSilenceMs - MarginMs) * 1000L;

        private long _heardUs;

        /// <summary>To be called for every line with a right checksum.</summary>
        public void Heard(long nowUs)
        {
            _heardUs = nowUs;
        }

        public bool IsSilent(long nowUs)
        {
            return nowUs - _heardUs >= LongestSilenceUs;
        }
    }
}
