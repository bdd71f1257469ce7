using Looseloop.Bench;
using Looseloop.Campaign;

return args switch
{
    ["coverage", string world, string seeds] => Coverage.Run(WorldShelf.Load(world), int.Parse(seeds, System.Globalization.CultureInfo.InvariantCulture)),
    ["random", string worlds, .. string[] rest] => RandomCampaign.Run(
        int.Parse(worlds, System.Globalization.CultureInfo.InvariantCulture),
        rest.Length > 0 ? ulong.Parse(rest[0], System.Globalization.CultureInfo.InvariantCulture) : 1,
        rest.Length > 1 && !rest[1].StartsWith('-') ? Enum.Parse<Defect>(rest[1]) : null,
        rest.Contains("-v")),
    ["one", string seed, .. string[] rest] => OneWorld.Run(
        ulong.Parse(seed, System.Globalization.CultureInfo.InvariantCulture), rest.Length > 0 ? Enum.Parse<Defect>(rest[0]) : null),
    ["rings", string worlds] => Rings.Run(int.Parse(worlds, System.Globalization.CultureInfo.InvariantCulture)),
    ["ladder", string world, string seed] => Ladders.Show(WorldShelf.Load(world), ulong.Parse(seed, System.Globalization.CultureInfo.InvariantCulture)),
    ["cool-downs", string worlds] => CoolDowns.Run(int.Parse(worlds, System.Globalization.CultureInfo.InvariantCulture)),
    ["log-memory", string hours] => LogMemory.Run(int.Parse(hours, System.Globalization.CultureInfo.InvariantCulture)),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: campaign coverage WORLD SEEDS | random WORLDS [FIRST-SEED [DEFECT]] [-v] | one SEED [DEFECT] | ladder WORLD SEED | rings WORLDS | cool-downs WORLDS | log-memory HOURS");
    return 2;
}
