#!/usr/bin/env bash
# Time and memory of `solve` as a process, and time of the analysis warm: `tests/measure.sh [CIRCUIT]`.
set -euo pipefail
cd "$(dirname "$0")/.."
circuit=${1:-netlists/bullwheel-bus.cause}
dotnet build -c Release -v q --nologo
dotnet run -c Release --no-build --project tests/CircuitTransient.Benchmarks -- \
  solve src/CircuitTransient.Cli/bin/Release/net10.0/circuit-transient.dll "$circuit"
