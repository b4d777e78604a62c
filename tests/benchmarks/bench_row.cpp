// What one factorisation saves: a state of the condensed row against solving the whole frame again, and whole
// checks, over the number of modules. Compare rows of one run; machines differ.

#include <benchmark/benchmark.h>

#include "fem/statics.h"
#include "models/assess.h"
#include "models/full_frame.h"
#include "models/trough.h"
#include "models/wind_load.h"
#include "tests/support/trough_design.h"

using namespace focalframe;
using namespace focalframe::models;

namespace {

TroughDesign row_of(benchmark::State& state) {
  TroughDesign d = support::small_row();
  d.row.modules = static_cast<int>(state.range(0));
  d.row.drive_after_module = d.row.modules / 2;
  return d;
}

void build_and_condense(benchmark::State& state) {
  const TroughDesign d = row_of(state);
  for (auto _ : state) benchmark::DoNotOptimize(RowModel(build_trough(d), {}));
}

void condensed_state(benchmark::State& state) {
  const RowModel row(build_trough(row_of(state)), {});
  for (auto _ : state) {
    const PoseModel pose = row.pose(0.7);
    benchmark::DoNotOptimize(row.end_forces(pose, weight_amplitudes(row, 0.7)));
  }
}

void full_solve(benchmark::State& state) {
  const Collector c = build_trough(row_of(state));
  fem::LoadCase weight;
  weight.gravity = {0, 0, -standard_gravity};
  for (auto _ : state) {
    const FullFrame full = full_frame(c, 0.7);
    benchmark::DoNotOptimize(fem::StaticSolver(full.frame).solve(weight));
  }
}

void whole_check(benchmark::State& state) {
  const TroughDesign d = row_of(state);
  const loads::CoefficientTable table = support::test_table();
  for (auto _ : state) benchmark::DoNotOptimize(assess(d, table, {.discretisation = false}));
}

}  // namespace

BENCHMARK(condensed_state)->Arg(1)->Arg(4)->Arg(12)->Unit(benchmark::kMillisecond);
BENCHMARK(full_solve)->Arg(1)->Arg(4)->Arg(12)->Unit(benchmark::kMillisecond);
BENCHMARK(build_and_condense)->Arg(1)->Arg(4)->Arg(12)->Unit(benchmark::kMillisecond);
BENCHMARK(whole_check)->Arg(1)->Arg(4)->Arg(12)->Unit(benchmark::kMillisecond);
BENCHMARK_MAIN();
