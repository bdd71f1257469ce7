// Each board is a process that keeps a core busy and is watched by the clock: one at a time.
[assembly: CollectionBehavior(DisableTestParallelization = true)]
