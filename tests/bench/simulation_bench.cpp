#include "simulation_loops.hpp"

#include <benchmark/benchmark.h>

// Simulated discount factors against a plain loop with the standard library's generator, normal numbers and
// exp; a name ending in "/std" is what the name before it is compared with. `items_per_second` counts values:
// paths, or mirror images.

namespace loops = forwright::bench;

namespace {

template <class Loop> void rounds(benchmark::State& state, Loop loop) {
    for (auto _ : state) {
        double sum = loop();
        benchmark::DoNotOptimize(sum);
    }
    state.SetItemsProcessed(state.iterations() * loops::values);
}

[[maybe_unused]] const bool registered = [] {
    const auto add = [](const char* name, double (*loop)()) {
        benchmark::RegisterBenchmark(name, [loop](benchmark::State& state) { rounds(state, loop); });
    };
    add("path kernel", loops::pathKernel);
    add("path kernel/std", loops::pathKernelPlain);
    add("path kernel, antithetic", loops::antitheticKernel);
    add("path kernel, antithetic/std", loops::pathKernelPlain);
    add("simulation, pseudo", loops::pseudoSimulation);
    add("simulation, pseudo/std", loops::simulationPlain);
    add("simulation, quasi", loops::quasiSimulation);
    add("simulation, quasi/std", loops::simulationPlain);
    return true;
}();

} // namespace
