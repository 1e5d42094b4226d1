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

# Compiled to machine code where there is a C linker, else ahead of time for the .NET runtime; the results are the same bytes.
# INSTRUCTIONS=x86-64-v3 makes an executable for other machines than this one.
INSTRUCTIONS ?= native
LINKER := $(shell command -v clang || command -v gcc)
COMPILED := $(if $(LINKER),-p:PublishAot=true -p:SelfContained=true -p:IlcInstructionSet=$(INSTRUCTIONS),-p:PublishReadyToRun=true)

$(MATCHED): $(SOURCES)
	rm -rf bin
	$(DOTNET) publish src/MatchedSuite.Cli/MatchedSuite.Cli.csproj -c $(CONFIGURATION) --use-current-runtime \
		$(COMPILED) -p:DebugType=none -p:PublishDocumentationFiles=false -o bin -v quiet
	@touch $@

demo: $(MATCHED) ## writes and analyses the invented demo study; results in artifacts/demo
	@$(MATCHED) demo --out artifacts/demo

test: $(MATCHED) ## every test: units, values from outside, the built executable
	$(DOTNET) test $(SOLUTION) -c $(CONFIGURATION) -v quiet --logger 'console;verbosity=minimal'

bench: $(MATCHED) ## ratios against short scripts on general-purpose libraries, error rates over many studies, the hot paths
	tests/MatchedSuite.Benchmarks/compare.sh $(MATCHED)
	CALIBRATION_STUDIES=20000 $(DOTNET) test tests/MatchedSuite.Statistics.Tests -c $(CONFIGURATION) -v quiet --filter FullyQualifiedName~CalibrationTests
	$(DOTNET) run --project tests/MatchedSuite.Benchmarks -c $(CONFIGURATION) -- --filter '*'

clean: ## removes what was built
	rm -rf bin artifacts
