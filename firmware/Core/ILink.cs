namespace Looseloop.Firmware
{
    /// <summary>The serial line to the host.</summary>
    public interface ILink
    {
        /// <summary>Takes what has arrived, without waiting.</summary>
        /// <returns>How many bytes were put into the buffer, from its start; 0 if none.</returns>
        int Receive(byte[] buffer);

        /// <summary>Sends the first <paramref name="count"/> bytes. The buffer may be changed when this returns.</summary>
        void Send(byte[] buffer, int count);
    }
}
