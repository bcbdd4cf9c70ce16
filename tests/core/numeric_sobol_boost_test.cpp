#include "numeric/sobol.hpp"

#include <boost/random/sobol.hpp>
#include <doctest/doctest.h>

using namespace forwright::numeric;

// Boost.Random's engine gives the points in Gray-code order and begins with the second: the one of index 1.
TEST_CASE("numeric: Sobol points are those of Boost.Random in every dimension") {
    boost::random::sobol_engine<std::uint32_t, 32> engine(sobolDimensions);
    for (std::uint32_t number = 1; number < 5000; ++number) {
        for (std::size_t dimension = 0; dimension < sobolDimensions; ++dimension) {
            REQUIRE(sobolPoint(dimension, number ^ (number >> 1U)) == engine());
        }
    }
}
