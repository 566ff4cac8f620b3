// The browser tests wait for real work on real time: they get the machine to themselves.
[assembly: CollectionBehavior(DisableTestParallelization = true)]
