#include "discounting_fixtures.hpp"
#include "numeric/normal.hpp"

using namespace forwright::discounting;
using namespace forwright::discounting::testing;
namespace numeric = forwright::numeric;

TEST_SUITE("numeric: normal law") {
    TEST_CASE("quantiles that AS 241 was published with (Wichura 1988: p = 0.25, 0.001, 1e-20; from memory, "
              "and mpmath)") {
        checkNear(numeric::normalQuantile(0.25), -0.67448975019608174, 1e-15);
        checkNear(numeric::normalQuantile(0.001), -3.0902323061678135, 1e-14);
        checkNear(numeric::normalQuantile(1e-20), -9.2623400897984076, 3e-14);
        CHECK(numeric::normalQuantile(0.5) == 0);
    }

    TEST_CASE("probabilities (mpmath 1.3, 30 digits)") {
        checkRelative(numeric::normalProbability(-1), 0.158655253931457051, 1e-14);
        checkRelative(numeric::normalProbability(-3), 1.34989803163009453e-3, 1e-13);
        checkRelative(numeric::normalProbability(-10), 7.61985302416052606e-24, 1e-13);
        checkRelative(numeric::normalProbability(-37), 5.72557122252458e-300, 2e-13);
        checkNear(numeric::normalProbability(2.5), 0.993790334674223869, 1e-15);
        CHECK(numeric::normalProbability(0) == 0.5);
        CHECK(numeric::normalProbability(40) == 1);
        CHECK(numeric::normalProbability(-40) == 0);
    }

    TEST_CASE("the one undoes the other") {
        for (double z = -8; z < 5; z += 0.01) {
            checkNear(numeric::normalQuantile(numeric::normalProbability(z)), z,
                      1e-13 + (z > 0 ? 1e-15 / numeric::normalProbability(-z) : 0));
        }
    }
}
