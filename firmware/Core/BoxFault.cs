using System;

namespace Looseloop.Firmware
{
    /// <summary>Ends what the box is doing; the code is one of Protocol.FaultCode.</summary>
    internal sealed class BoxFault : Exception
    {
        public BoxFault(int code)
        {
            Code = code;
        }

        public int Code { get; }
    }
}
