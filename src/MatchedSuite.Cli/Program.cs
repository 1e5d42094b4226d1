return MatchedSuite.Cli.CommandLine.Run(args);
