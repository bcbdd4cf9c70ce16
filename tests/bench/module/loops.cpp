// The loops in the module: prints a line of JSON for each, nanoseconds a value, as medians of
// several rounds.
#include "../forward_loops.hpp"
#include "../simulation_loops.hpp"

#include <algorithm>
#include <cstdio>

namespace loops = forwright::bench;

namespace {

double kept = 0.0;

void time(const char* name, double (*loop)(), long values) {
    constexpr int rounds = 15;
    std::vector<double> nanoseconds;
    for (int round = 0; round < rounds + 2; ++round) {
        const auto start = std::chrono::steady_clock::now();
        kept += loop();
        const std::chrono::duration<double, std::nano> took = std::chrono::steady_clock::now() - start;
        if (round >= 2) { // before, the engine may not yet have compiled for speed
            nanoseconds.push_back(took.count() / static_cast<double>(values));
        }
    }
    std::sort(nanoseconds.begin(), nanoseconds.end());
    std::printf("{\"name\": \"%s\", \"nanoseconds\": %.3f}\n", name, nanoseconds[rounds / 2]);
}

} // namespace

int main() {
    time("path kernel", loops::pathKernel, loops::values);
    time("path kernel/std", loops::pathKernelPlain, loops::values);
    time("path kernel, antithetic", loops::antitheticKernel, loops::values);
    time("path kernel, antithetic/std", loops::pathKernelPlain, loops::values);
    time("simulation, pseudo", loops::pseudoSimulation, loops::values);
    time("simulation, pseudo/std", loops::simulationPlain, loops::values);
    time("batch of forwards", loops::batch, loops::forwards);
    time("batch of forwards/std", loops::batchPlain, loops::forwards);
    return kept == 0.0 ? 1 : 0;
}
