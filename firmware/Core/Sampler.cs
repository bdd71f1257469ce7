using System;
using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Takes samples of one input in pieces short enough that the link is not forgotten, and adds them up.</summary>
    internal sealed class Sampler
    {
        // So many squares of 12-bit counts still fit an int, which the interpreter adds faster than a long.
        private const int MostAtOnce = 128;
        private const int ClockEvery = 8;

        // Evenly spaced samples take a carrier that beats near a multiple of their rate for a level. So they wander: from one to
        // the next by up to 307/1024 of the spacing or of a millisecond, never by more than two spacings in all.
        private const int WidestSpacingUs = 1000;

        private readonly IPickup _pickup;
        private readonly SteadyClock _clock;
        private readonly int _fullCounts;
        private int _channel;
        private int _wanted;
        private int _spacingUs;
        private long _durationUs;
        private long _endUs;
        private int _wanderUs;
        private int _offsetUs;
        private int _random = 1;

        public Sampler(IPickup pickup, SteadyClock clock, int fullCounts)
        {
            _pickup = pickup;
            _clock = clock;
            _fullCounts = fullCounts;
        }

        public int Samples { get; private set; }

        public long Sum { get; private set; }

        public long Squares { get; private set; }

        public int Smallest { get; private set; }

        public int Largest { get; private set; }

        public long FromUs { get; private set; }

        public long ToUs { get; private set; }

        public long MiddleUs
        {
            get { return FromUs + (ToUs - FromUs) / 2; }
        }

        /// <summary>Prepares to take a number of samples, so far apart; 0: as fast as it can.</summary>
        public void BeginCount(int channel, int samples, int spacingUs)
        {
            Begin(channel, samples, spacingUs, 0);
        }

        /// <summary>Prepares to take samples, one at least, for a time from the first one on.</summary>
        public void BeginTime(int channel, long durationUs, int spacingUs)
        {
            Begin(channel, int.MaxValue, spacingUs, durationUs);
        }

        /// <summary>Takes samples until all are there, but not for long past a time.</summary>
        /// <returns>True if all are there.</returns>
        public bool Advance(long untilUs)
        {
            if (Samples == 0)
            {
                FromUs = _clock.NowUs();
                _endUs = _durationUs > 0 ? FromUs + _durationUs : long.MaxValue;
            }

            if (untilUs > _endUs)
            {
                untilUs = _endUs;
            }

            if (_spacingUs == 0)
            {
                TakeFast(untilUs);
            }
            else
            {
                TakeSpaced(untilUs);
            }

            ToUs = _clock.NowUs();
            return Samples > 0 && (Samples >= _wanted || ToUs >= _endUs);
        }

        /// <summary>One sample, outside any count.</summary>
        public int ReadOne(int channel)
        {
            int level;
            try
            {
                level = _pickup.Read(channel);
            }
            catch (Exception)
            {
                throw new BoxFault(FaultCode.PickupFailed);
            }

            if ((uint)level > (uint)_fullCounts)
            {
                throw new BoxFault(FaultCode.PickupFailed);
            }

            return level;
        }

        private void Begin(int channel, int samples, int spacingUs, long durationUs)
        {
            _channel = channel;
            _wanted = samples;
            _spacingUs = spacingUs;
            _durationUs = durationUs;
            _wanderUs = (spacingUs < WidestSpacingUs ? spacingUs : WidestSpacingUs) * 307 >> 10;
            _offsetUs = 0;
            Samples = 0;
            Sum = 0;
            Squares = 0;
            Smallest = _fullCounts;
            Largest = 0;
        }

        private void TakeFast(long untilUs)
        {
            IPickup pickup = _pickup;
            int channel = _channel;
            uint full = (uint)_fullCounts;
            int smallest = Smallest;
            int largest = Largest;
            int sum = 0;
            int squares = 0;
            int taken = 0;
            int beforeClock = ClockEvery;
            int most = _wanted - Samples;
            if (most > MostAtOnce)
            {
                most = MostAtOnce;
            }

            try
            {
                while (taken < most)
                {
                    int level = pickup.Read(channel);
                    if ((uint)level > full)
                    {
                        throw new BoxFault(FaultCode.PickupFailed);
                    }

                    sum += level;
                    squares += level * level;
                    if (level < smallest)
                    {
                        smallest = level;
                    }

                    if (level > largest)
                    {
                        largest = level;
                    }

                    taken++;
                    if (--beforeClock == 0)
                    {
                        if (_clock.NowUs() >= untilUs)
                        {
                            break;
                        }

                        beforeClock = ClockEvery;
                    }
                }
            }
            catch (Exception)
            {
                throw new BoxFault(FaultCode.PickupFailed);
            }

            Samples += taken;
            Sum += sum;
            Squares += squares;
            Smallest = smallest;
            Largest = largest;
        }

        private void TakeSpaced(long untilUs)
        {
            for (int taken = 0; taken < MostAtOnce && Samples < _wanted; taken++)
            {
                long dueUs = FromUs + (long)Samples * _spacingUs + _offsetUs;
                if (dueUs > untilUs || dueUs >= _endUs)
                {
                    _clock.WaitUntilUs(untilUs);
                    return;
                }

                _clock.WaitUntilUs(dueUs);
                int level = ReadOne(_channel);
                Sum += level;
                Squares += level * level;
                if (level < Smallest)
                {
                    Smallest = level;
                }

                if (level > Largest)
                {
                    Largest = level;
                }

                Samples++;
                Wander();
            }
        }

        private void Wander()
        {
            // A linear congruence of 16 bits: cheap in the interpreter, and of no other use.
            _random = (_random * 25173 + 13849) & 0xFFFF;
            int step = (_random * (2 * _wanderUs + 1) >> 16) - _wanderUs;
            int offset = _offsetUs + step;
            _offsetUs = offset > 2 * _spacingUs || offset < -2 * _spacingUs ? _offsetUs - step : offset;
        }
    }
}
