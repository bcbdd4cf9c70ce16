#include "contract/answer.hpp"
#include "forward_loops.hpp"

#include <benchmark/benchmark.h>

#include <fstream>
#include <iterator>
#include <string>

// Whole quotes through the text call, and many forwards on shared curves against a plain loop; a name ending
// in
// "/std" is what the name before it is compared with.

namespace loops = forwright::bench;

namespace {

template <class Loop> void batch(benchmark::State& state, Loop loop) {
    for (auto _ : state) {
        double sum = loop();
        benchmark::DoNotOptimize(sum);
    }
    state.SetItemsProcessed(state.iterations() * loops::forwards);
}

/// The request that the page opens with.
std::string demonstration() {
    std::ifstream file(FORWRIGHT_DEMONSTRATION);
    return {std::istreambuf_iterator<char>(file), std::istreambuf_iterator<char>()};
}

void wholeQuote(benchmark::State& state) {
    const std::string request = demonstration();
    for (auto _ : state) {
        auto answer = forwright::contract::answer(request);
        benchmark::DoNotOptimize(answer.text.data());
    }
}

[[maybe_unused]] const bool registered = [] {
    benchmark::RegisterBenchmark("batch of forwards",
                                 [](benchmark::State& state) { batch(state, loops::batch); });
    benchmark::RegisterBenchmark("batch of forwards/std",
                                 [](benchmark::State& state) { batch(state, loops::batchPlain); });
    benchmark::RegisterBenchmark("whole quote", wholeQuote);
    return true;
}();

} // namespace
