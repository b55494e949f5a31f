#!/usr/bin/env bash
# What `--by edge|switching|mode` costs beside a plain solve: `tests/measure-by.sh [CIRCUIT…]`, else the demonstration
# plants; twice the time is what each may take.
set -euo pipefail
cd "$(dirname "$0")/.."
if [ $# -eq 0 ]; then set -- netlists/*.cause; fi
dotnet run -c Release --project tests/CircuitTransient.Benchmarks -- by "$@"
