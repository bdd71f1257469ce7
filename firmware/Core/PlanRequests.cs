using Looseloop.Protocol;

namespace Looseloop.Firmware
{
    /// <summary>The requests that write the plan: `plan`, `run`, `list`. Each method returns a code of Protocol.FaultCode.</summary>
    internal sealed class PlanRequests
    {
        private const int SettingsPerList = 8;

        private readonly PlanStore _plan;
        private readonly Talker _talker;
        private int _lastDone; // number of the `run` or `list` that was the last request done, else 0

        public PlanRequests(PlanStore plan, Talker talker)
        {
            _plan = plan;
            _talker = talker;
        }

        /// <summary>To be called when any other request is done: a number that comes again is then a new request.</summary>
        public void ForgetLast()
        {
            _lastDone = 0;
        }

        public int Plan(int request, RequestFields fields)
        {
            ForgetLast();
            if (fields.More)
            {
                return FaultCode.BadFields;
            }

            _plan.Clear();
            _talker.Planned(request, _plan.Settings);
            return FaultCode.None;
        }

        public int Run(int request, RequestFields fields)
        {
            if (request == _lastDone)
            {
                return Answer(request);
            }

            if (!fields.TakeDutyBits(out int bits)
                || !fields.TakeDivider(out int divider)
                || !fields.TakeStride(out int stride)
                || !fields.Take(1, WireLimits.SweepPoints, out int count)
                || !fields.TakeDutyCount(out int duty)
                || fields.More)
            {
                return FaultCode.BadFields;
            }

            int code = _plan.TryAdd(bits, divider, stride, count, duty);
            return code == FaultCode.None ? Answer(request) : code;
        }

        public int List(int request, RequestFields fields)
        {
            if (request == _lastDone)
            {
                return Answer(request);
            }

            int before = _plan.Entries;
            int code = FaultCode.None;
            int settings = 0;
            do
            {
                code = settings < SettingsPerList ? AddOne(fields) : FaultCode.BadFields;
                settings++;
            }
            while (code == FaultCode.None && fields.More);

            if (code != FaultCode.None)
            {
                _plan.CutBack(before);
                return code;
            }

            return Answer(request);
        }

        private int AddOne(RequestFields fields)
        {
            return fields.TakeDutyBits(out int bits) && fields.TakeDivider(out int divider) && fields.TakeDutyCount(out int duty)
                ? _plan.TryAdd(bits, divider, 0, 1, duty)
                : FaultCode.BadFields;
        }

        private int Answer(int request)
        {
            _lastDone = request;
            _talker.Planned(request, _plan.Settings);
            return FaultCode.None;
        }
    }
}
