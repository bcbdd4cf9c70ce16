#include "discounting/simulation.hpp"
#include "discounting_fixtures.hpp"

#include <boost/math/distributions/normal.hpp>
#include <boost/math/distributions/students_t.hpp>

using namespace forwright::discounting;
using namespace forwright::discounting::testing;

namespace {

/// The estimate from the first `blocks` blocks of a plan.
SimulationEstimate estimateFrom(const SimulationPlan& plan, long blocks) {
    const CurvePtr curve = made(vasicek(asOf, {0.05, 0.1, 0.08, 0.015}));
    const Payments payments{{afterDays(700)}, {0.0}, 0, 100.0};
    const auto simulation = Simulation::make(*curve, payments, plan, {});
    REQUIRE(simulation.ok());
    BinCounts counts(Bins{}.count + 2, 0);
    std::vector<long> indices;
    std::vector<BlockSums> sums;
    for (long block = 0; block < blocks; ++block) {
        indices.push_back(block);
        sums.push_back(simulation.value().block(block, counts));
    }
    return simulation.value().estimate(indices, sums);
}

} // namespace

TEST_SUITE("simulation: against Boost.Math") {
    TEST_CASE(
        "an interval of 95 % reaches as far as Student's law over the scramblings says, and the normal over "
        "independent pairs") {
        for (long blocks = 2; blocks <= scramblings; ++blocks) {
            const SimulationEstimate estimate = estimateFrom({SimulationMethod::quasi, 1L << 16U, 1}, blocks);
            const boost::math::students_t law(static_cast<double>(blocks - 1));
            checkRelative(estimate.reach95, boost::math::quantile(law, 0.975), 1e-9);
        }
        checkRelative(estimateFrom({SimulationMethod::pseudo, 8192, 1}, 2).reach95,
                      boost::math::quantile(boost::math::normal(), 0.975), 1e-15);
    }
}
