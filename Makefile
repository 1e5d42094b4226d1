# The whole project from two commands: `make demo` and `make test`.
CONFIGURATION := Release
SOLUTION := MatchedSuite.sln
MATCHED := bin/matched
SOURCES := $(shell find src -name '*.cs' -o -name '*.csproj' -o -path 'src/*' -name '*.yaml') $(shell find configs -type f) Directory.Build.props Directory.Packages.props global.json
DOTNET := dotnet
export DOTNET_CLI_TELEMETRY_OPTOUT := 1
export DOTNET_NOLOGO := 1

.PHONY: build demo test bench clean help

help: ## what can be made
	@awk -F ':.*## ' '/^[a-z]+:.*## / { printf "  make %-7s %s\n", $$1, $$2 }' $(MAKEFILE_LIST)

build: $(MATCHED) ## the executable bin/matched

# A run lasts from tenths of a second to hours: code compiled ahead starts at once, hot loops are compiled again.
$(MATCHED): $(SOURCES)
	$(DOTNET) publish src/MatchedSuite.Cli/MatchedSuite.Cli.csproj -c $(CONFIGURATION) --use-current-runtime \
		-p:PublishReadyToRun=true -p:DebugType=none -o bin -v quiet
	@touch $@

demo: $(MATCHED) ## writes and analyses the invented demo study; results in artifacts/demo
	@$(MATCHED) demo --out artifacts/demo

test: $(MATCHED) ## every test: units, values from outside, the built executable
	$(DOTNET) test $(SOLUTION) -c $(CONFIGURATION) -v quiet --logger 'console;verbosity=minimal'

bench: $(MATCHED) ## ratios against short scripts on general-purpose libraries, then the hot paths
	tests/MatchedSuite.Benchmarks/compare.sh $(MATCHED)
	$(DOTNET) run --project tests/MatchedSuite.Benchmarks -c $(CONFIGURATION) -- --filter '*'

clean: ## removes what was built
	rm -rf bin artifacts
