// The suites' helper library brings GoogleTest's main along; this one goes first.
#include <benchmark/benchmark.h>

BENCHMARK_MAIN();
