using System.CommandLine;
using System.Globalization;

namespace Looseloop.Arguments;

/// <summary>Options that take a plain number whose unit is in the option's name, such as --pf.</summary>
internal static class NumberOption
{
    public static Option<double?> Create(string name, string description) => new(name)
    {
        Description = description,
        HelpName = "NUMBER",
        CustomParser = result =>
        {
            string text = result.Tokens.Count > 0 ? result.Tokens[0].Value : "";
            if (double.TryParse(text, NumberStyles.Float, CultureInfo.InvariantCulture, out double value) && double.IsFinite(value))
            {
                return value;
            }

            result.AddError($"{name} wants a number, not '{text}'.");
            return null;
        },
    };
}
