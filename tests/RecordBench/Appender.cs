using Looseloop.Readings;
using Looseloop.Record;

namespace Looseloop.RecordBench;

/// <summary>Appends readings to a record without end, and prints the id of each after it was kept. Made to be killed.</summary>
internal static class Appender
{
    public static int Run(string path)
    {
        using RecordStore store = RecordStore.Open(path, DateTimeOffset.UtcNow);
        RunStart start = SampleReadings.Start();
        store.Append(start);
        Console.WriteLine("open");
        for (int n = 0; ; n++)
        {
            Reading reading = SampleReadings.At(n);
            store.Append(start.Id, reading);
            Console.WriteLine(reading.Id);
        }
    }
}
