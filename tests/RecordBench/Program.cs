using System.Globalization;
using Looseloop.RecordBench;

return args switch
{
    ["append", var path] => Appender.Run(path),
    ["speed", var path, var count] => SpeedTrial.Run(path, int.Parse(count, CultureInfo.InvariantCulture)),
    ["kill", var path, var kills] => Kill(path, int.Parse(kills, CultureInfo.InvariantCulture)),
    _ => Usage(),
};

static int Kill(string path, int kills)
{
    KillTrial trial = new(path, Environment.TickCount);
    for (int i = 0; i < kills; i++)
    {
        if (trial.Once(typeof(KillTrial).Assembly.Location) is { } wrong)
        {
            Console.WriteLine($"kill {i + 1}: {wrong}");
            return 1;
        }
    }

    Console.WriteLine($"{kills} kills, {trial.Acknowledged} readings acknowledged, none lost, record intact each time");
    return 0;
}

static int Usage()
{
    Console.Error.WriteLine("append FILE | speed FILE COUNT | kill FILE COUNT");
    return 2;
}
