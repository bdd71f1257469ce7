using Looseloop.Bench;
using Looseloop.Campaign;

return args switch
{
    ["coverage", string world, string seeds] => Coverage.Run(WorldShelf.Load(world), int.Parse(seeds, System.Globalization.CultureInfo.InvariantCulture)),
    _ => Usage(),
};

static int Usage()
{
    Console.Error.WriteLine("usage: campaign coverage WORLD SEEDS");
    return 2;
}
