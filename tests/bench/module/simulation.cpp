// The simulation loops in the module: prints a line of JSON for each, nanoseconds a value, as medians of
// several rounds.
#include "../simulation_loops.hpp"

#include <algorithm>
#include <cstdio>

namespace loops = forwright::bench;

namespace {

double kept = 0.0;

void time(const char* name, double (*loop)()) {
    constexpr int rounds = 15;
    std::vector<double> nanoseconds;
    for (int round = 0; round < rounds + 2; ++round) {
        const auto start = std::chrono::steady_clock::now();
        kept += loop();
        const std::chrono::duration<double, std::nano> took = std::chrono::steady_clock::now() - start;
        if (round >= 2) { // before, the engine may not yet have compiled for speed
            nanoseconds.push_back(took.count() / static_cast<double>(loops::values));
        }
    }
    std::sort(nanoseconds.begin(), nanoseconds.end());
    std::printf("{\"name\": \"%s\", \"nanoseconds\": %.3f}\n", name, nanoseconds[rounds / 2]);
}

} // namespace

int main() {
    time("path kernel", loops::pathKernel);
    time("path kernel/plain", loops::pathKernelPlain);
    time("path kernel, antithetic", loops::antitheticKernel);
    time("simulation, pseudo", loops::pseudoSimulation);
    time("simulation, pseudo/plain", loops::simulationPlain);
    time("simulation, quasi", loops::quasiSimulation);
    return kept == 0.0 ? 1 : 0;
}
