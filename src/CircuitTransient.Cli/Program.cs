using CircuitTransient.Cli;

using var interruption = new Interruption();
using var streams = Streams.OfProcess();
return App.Run(args, streams, interruption.Token);
