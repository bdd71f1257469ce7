using System;
using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>
    /// The whole box: listens, works, and keeps the drive off whenever anything is wrong. One thread calls
    /// <see cref="Step"/> for ever; no exception leaves it.
    /// </summary>
    public sealed class BoxLoop
    {
        // Short enough that 115200 baud cannot fill the receive ring of 256 bytes meanwhile.
        private const long StepUs = 20000;
        private const long LinkFaultEveryUs = 1000000;

        private readonly SteadyClock _clock;
        private readonly Drive _drive;
        private readonly Talker _talker;
        private readonly Listener _listener;
        private readonly HostWatch _host = new HostWatch();
        private readonly RequestHandler _requests;
        private long _nextLinkFaultUs;

        /// <summary>Makes a box with its drive stopped.</summary>
        public BoxLoop(BoxProfile profile, IExcitation excitation, IPickup pickup, IClock clock, ILink link)
        {
            _clock = new SteadyClock(clock);
            _drive = new Drive(excitation);
            _drive.Stop();
            _talker = new Talker(link, _clock);
            _listener = new Listener(link);
            _requests = new RequestHandler(profile, pickup, _talker, _clock, _drive);
        }

        /// <summary>Listens, then does one piece of the work in progress: some 20 ms, and one line sent, at most.</summary>
        /// <returns>False if there was nothing to do: the caller may sleep for some milliseconds.</returns>
        public bool Step()
        {
            try
            {
                return Listen() | Work();
            }
            catch (BoxFault fault)
            {
                Recover(fault.Code);
            }
            catch (Exception)
            {
                Recover(FaultCode.Internal);
            }

            return true;
        }

        private bool Listen()
        {
            bool heard;
            try
            {
                heard = _listener.Poll();
            }
            catch (Exception)
            {
                LinkFailed();
                return false;
            }

            if (!heard)
            {
                return false;
            }

            if (_listener.LineWasTooLong)
            {
                _talker.Fault(0, FaultCode.LineTooLong);
            }
            else if (!_requests.Open(_listener.Line, _listener.Count))
            {
                _talker.Fault(0, FaultCode.UnreadableLine);
            }
            else
            {
                _host.Heard(_clock.NowUs());
                _requests.Handle();
            }

            return true;
        }

        private bool Work()
        {
            if (_drive.IsUnsure)
            {
                _drive.Stop();
            }

            Activity current = _requests.Current;
            if (current == null)
            {
                return false;
            }

            if (current.Drives && _host.IsSilent(_clock.NowUs()))
            {
                _requests.Current = null;
                current.EndEarly(Ending.Faulted, FaultCode.HostSilent);
                return true;
            }

            if (_clock.NowUs() >= _talker.AliveDueUs)
            {
                _talker.Alive(current.Request);
            }

            long untilUs = _clock.NowUs() + StepUs;
            if (untilUs > _talker.AliveDueUs)
            {
                untilUs = _talker.AliveDueUs;
            }

            current.Advance(untilUs);
            if (current.IsFinished)
            {
                _requests.Current = null;
            }

            return true;
        }

        // A receiver that throws would do so at every step: it ends what is going on, and is spoken of once a second.
        private void LinkFailed()
        {
            long nowUs = _clock.NowUs();
            if (_requests.Current == null && nowUs < _nextLinkFaultUs)
            {
                return;
            }

            _nextLinkFaultUs = nowUs + LinkFaultEveryUs;
            Recover(FaultCode.Internal);
        }

        // Drive off first, then what can still be said: the link may be what failed.
        private void Recover(int code)
        {
            _drive.Stop();
            Activity current = _requests.Current;
            _requests.Current = null;
            try
            {
                if (current != null && !current.IsFinished)
                {
                    current.EndEarly(Ending.Faulted, code);
                }
                else
                {
                    _talker.Fault(current != null ? current.Request : _requests.Request, code);
                }
            }
            catch (Exception)
            {
                _drive.Stop();
            }
        }
    }
}
