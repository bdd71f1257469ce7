using System;
using System.Threading;
using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Puts a board together and runs its box for ever on the one thread there is.</summary>
    public static class BoardRunner
    {
        private const int IdleMs = 1; // the scheduler makes 10 of it: half of what the receive ring can take
        private const int RestMs = 500;

        public static void Run(PinMap pins)
        {
            // First of all the pin: with the channel made and stopped it rests low, whatever else fails.
            PwmExcitation excitation = null;
            while (true)
            {
                UartLink link = null;
                try
                {
                    if (excitation == null)
                    {
                        excitation = new PwmExcitation(pins.DrivePin);
                    }

                    excitation.Stop();
                    var clock = new BoardClock();
                    var pickup = new AdcPickup(pins);
                    link = new UartLink(pins, clock);
                    Serve(new BoxLoop(Profile(pins, pickup, clock), excitation, pickup, clock, link));
                }
                catch (Exception)
                {
                    // Nothing that BoxLoop does gets here: this is a port or a converter that could not be opened.
                    StopQuietly(excitation);
                    CloseQuietly(link);
                }

                Thread.Sleep(RestMs);
            }
        }

        private static void Serve(BoxLoop loop)
        {
            while (true)
            {
                if (!loop.Step())
                {
                    Thread.Sleep(IdleMs);
                }
            }
        }

        private static BoxProfile Profile(PinMap pins, AdcPickup pickup, BoardClock clock)
        {
            return new BoxProfile(pins.Board, DrawBootId(pickup, clock), pins.MostDutyBits);
        }

        // There is no clock that survives a restart and no other chance to be had: the last bits of conversions, and how long
        // they took to come.
        private static int DrawBootId(AdcPickup pickup, BoardClock clock)
        {
            int id = 1;
            for (int i = 0; i < 32; i++)
            {
                id = id * 31 + pickup.Read(Channel.Detector);
                id = id * 31 + (int)clock.NowUs();
            }

            id &= int.MaxValue;
            return id == 0 ? 1 : id;
        }

        private static void StopQuietly(PwmExcitation excitation)
        {
            try
            {
                if (excitation != null)
                {
                    excitation.Stop();
                }
            }
            catch (Exception)
            {
            }
        }

        private static void CloseQuietly(UartLink link)
        {
            try
            {
                if (link != null)
                {
                    link.Close();
                }
            }
            catch (Exception)
            {
            }
        }
    }
}
