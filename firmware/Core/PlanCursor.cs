using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>Walks through a plan in one of the orders of Protocol.SweepOrder.</summary>
    internal sealed class PlanCursor
    {
        private readonly PlanStore _plan;
        private int _entry;
        private int _position;
        private bool _backwards;
        private bool _turns;

        public PlanCursor(PlanStore plan)
        {
            _plan = plan;
        }

        /// <summary>Points of the whole walk.</summary>
        public int Points { get; private set; }

        public int DutyBits { get; private set; }

        public int Divider { get; private set; }

        public int DutyCount { get; private set; }

        /// <summary>Goes to the first setting of a plan that is not empty.</summary>
        public void Begin(int order)
        {
            _backwards = order == SweepOrder.Reversed;
            _turns = order == SweepOrder.ThereAndBack;
            Points = _turns ? 2 * _plan.Settings : _plan.Settings;
            _entry = _backwards ? _plan.Entries - 1 : 0;
            _position = _backwards ? _plan.CountOf(_entry) - 1 : 0;
            Take();
        }

        /// <summary>Goes to the next setting; there must be one.</summary>
        public void Next()
        {
            if (_backwards)
            {
                StepBack();
            }
            else
            {
                StepOn();
            }

            Take();
        }

        private void StepOn()
        {
            if (_position + 1 < _plan.CountOf(_entry))
            {
                _position++;
            }
            else if (_entry + 1 < _plan.Entries)
            {
                _entry++;
                _position = 0;
            }
            else if (_turns)
            {
                _backwards = true; // and stays: the last setting is measured twice
            }
        }

        private void StepBack()
        {
            if (_position > 0)
            {
                _position--;
            }
            else if (_entry > 0)
            {
                _entry--;
                _position = _plan.CountOf(_entry) - 1;
            }
        }

        private void Take()
        {
            DutyBits = _plan.DutyBitsOf(_entry);
            Divider = _plan.DividerOf(_entry, _position);
            DutyCount = _plan.DutyCountOf(_entry);
        }
    }
}
