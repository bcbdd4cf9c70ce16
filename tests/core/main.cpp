#define DOCTEST_CONFIG_IMPLEMENT
#include <doctest/doctest.h>

#include <cstdlib>

/// Runs the suite. RapidCheck's properties get one seed, which it prints, so that a run can be repeated;
/// another is taken from the environment: RC_PARAMS="seed=7".
int main(int argc, char** argv) {
#ifndef __EMSCRIPTEN__
    ::setenv("RC_PARAMS", "seed=20261201", 0);
#endif
    return doctest::Context(argc, argv).run();
}
