// Catch2 3 brings its main() as a library; 2.13 makes it here.
#if !__has_include(<catch2/catch_all.hpp>)
#define CATCH_CONFIG_MAIN
#include <catch2/catch.hpp>
#endif
