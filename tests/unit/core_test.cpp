#include "carlin/core/error.hpp"
#include "carlin/core/require.hpp"

#include <catch2/catch.hpp>
#include <limits>

using Catch::Matchers::Contains;

TEST_CASE("A value out of range is refused with its name, value and range", "[unit][core]")
{
  CHECK(carlin::require_positive("thickness", 0.006, "m") == 0.006);
  CHECK_THROWS_WITH(carlin::require_positive("thickness", -0.006, "m"),
                    Contains("thickness is -0.006 m") && Contains("greater than 0"));
  CHECK_THROWS_AS(carlin::require_finite("load", std::numeric_limits<double>::quiet_NaN(), "N"),
                  carlin::ValueError);
}

TEST_CASE("Problems of a model are listed in the order of the file", "[unit][core]")
{
  const carlin::ModelError error({{{"a.yaml", 9, 1}, "second"}, {{"a.yaml", 2, 5}, "first"}});
  CHECK(std::string(error.what()) == "a.yaml:2:5: error: first\na.yaml:9:1: error: second");
}
