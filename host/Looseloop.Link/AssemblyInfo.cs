using System.Runtime.CompilerServices;

[assembly: InternalsVisibleTo("Looseloop.Link.Tests")]
