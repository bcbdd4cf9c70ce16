#include "numeric/elementary.hpp"
#include "numeric/lanes.hpp"

#include <benchmark/benchmark.h>

#include <cmath>
#include <cstddef>
#include <cstdint>
#include <random>
#include <vector>

// The elementary functions against those of the C library, over 1,024 arguments a round. `items_per_second`
// counts calls; a name ending in "/std" is what the name before it is compared with.

namespace numeric = forwright::numeric;

namespace {

constexpr std::size_t argumentCount = 1024;

std::vector<double> arguments(double low, double high) {
    std::mt19937_64 engine(20110);
    std::vector<double> all(argumentCount);
    for (double& x : all) {
        x = low + (high - low) * (static_cast<double>(engine() >> 11U) * 0x1p-53);
    }
    return all;
}

void countCalls(benchmark::State& state) {
    state.SetItemsProcessed(state.iterations() * static_cast<std::int64_t>(argumentCount));
}

template <class Function> void callEach(benchmark::State& state, double low, double high, Function function) {
    const std::vector<double> from = arguments(low, high);
    std::vector<double> to(argumentCount);
    for (auto _ : state) {
        for (std::size_t i = 0; i < argumentCount; ++i) {
            to[i] = function(from[i]);
        }
        benchmark::DoNotOptimize(to.data());
        benchmark::ClobberMemory();
    }
    countCalls(state);
}

template <class Function>
void callLanes(benchmark::State& state, double low, double high, Function function) {
    const std::vector<double> from = arguments(low, high);
    std::vector<double> to(argumentCount);
    for (auto _ : state) {
        for (std::size_t i = 0; i < argumentCount; i += numeric::lanes::count) {
            numeric::lanes::store(function(numeric::lanes::load(&from[i])), &to[i]);
        }
        benchmark::DoNotOptimize(to.data());
        benchmark::ClobberMemory();
    }
    countCalls(state);
}

/// Registers one function; the call is spelt out in a lambda so that it can be inlined where the library
/// allows it.
template <class Function> void each(const char* name, double low, double high, Function function) {
    benchmark::RegisterBenchmark(name,
                                 [=](benchmark::State& state) { callEach(state, low, high, function); });
}

[[maybe_unused]] const bool registered = [] {
    each("exp", -5.0, 5.0, [](double x) { return numeric::exp(x); });
    each("exp/std", -5.0, 5.0, [](double x) { return std::exp(x); });
    each("log", 0.5, 3.0, [](double x) { return numeric::log(x); });
    each("log/std", 0.5, 3.0, [](double x) { return std::log(x); });
    each("expm1", -0.5, 0.5, [](double x) { return numeric::expm1(x); });
    each("expm1/std", -0.5, 0.5, [](double x) { return std::expm1(x); });
    each("log1p", -0.5, 0.5, [](double x) { return numeric::log1p(x); });
    each("log1p/std", -0.5, 0.5, [](double x) { return std::log1p(x); });
    each("sine and cosine", -50.0, 50.0, [](double x) {
        const numeric::SineCosine both = numeric::sineCosine(x);
        return both.sine + both.cosine;
    });
    each("sine and cosine/std", -50.0, 50.0, [](double x) { return std::sin(x) + std::cos(x); });
    each("argument", -2.0, 2.0, [](double y) { return numeric::argument(y, 0.7); });
    each("argument/std", -2.0, 2.0, [](double y) { return std::atan2(y, 0.7); });
    benchmark::RegisterBenchmark("exp, 4 lanes", [](benchmark::State& state) {
        callLanes(state, -5.0, 5.0, [](numeric::lanes::Lanes x) { return numeric::lanes::exp(x); });
    });
    each("exp, 4 lanes/std", -5.0, 5.0, [](double x) { return std::exp(x); });
    benchmark::RegisterBenchmark("log, 4 lanes", [](benchmark::State& state) {
        callLanes(state, 0.5, 3.0, [](numeric::lanes::Lanes x) { return numeric::lanes::log(x); });
    });
    each("log, 4 lanes/std", 0.5, 3.0, [](double x) { return std::log(x); });
    return true;
}();

} // namespace
