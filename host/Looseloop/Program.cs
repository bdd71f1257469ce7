using Looseloop;
using Looseloop.Terminal;

using var interrupt = new Interrupt();
return App.Run(args, Shell.OfThisProcess(interrupt));
