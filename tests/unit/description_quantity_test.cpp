#include "carlin/core/error.hpp"
#include "carlin/core/quantity.hpp"

#include <catch2/catch.hpp>
#include <cmath>
#include <numbers>

using carlin::Dimension;
using carlin::quantity_in_si;
using Catch::Matchers::Contains;
using Catch::Matchers::WithinRel;

// Round-off: each is one multiplication; factors by definition of the unit.
TEST_CASE("A quantity with its unit becomes its value in SI", "[unit][quantity]")
{
  const auto is = [](const char* text, Dimension dimension, double value)
  {
    CAPTURE(text);
    CHECK_THAT(quantity_in_si(text, dimension), WithinRel(value, 1e-12));
  };
  is("6 mm", Dimension::length, 0.006);
  is("6mm", Dimension::length, 0.006);
  is("+1.5e1 cm", Dimension::length, 0.15);
  is("210 GPa", Dimension::pressure, 210e9);
  is("350 bar", Dimension::pressure, 35e6);
  is("1200 mm2", Dimension::area, 1.2e-3);
  is("2.5e6 mm^4", Dimension::second_moment, 2.5e-6);
  is("9.5 t", Dimension::mass, 9500.0);
  is("250 g", Dimension::mass, 0.25);
  is("2.5 g", Dimension::acceleration, 2.5 * 9.80665); // ISO 80000-3
  is("3 m/s2", Dimension::acceleration, 3.0);
  is("25 knot", Dimension::speed, 25.0 * 1852.0 / 3600.0); // the nautical mile is 1852 m
  is("18 deg", Dimension::angle, 18.0 * std::numbers::pi / 180.0);
  is("0.3 rad", Dimension::angle, 0.3);
  is("15 degC", Dimension::temperature, 288.15);
  is("15 °C", Dimension::temperature, 288.15);
  is("288.15 K", Dimension::temperature, 288.15);
  is("40 K", Dimension::temperature_change, 40.0);
  is("40 delta_degC", Dimension::temperature_change, 40.0);
  is("23.8e-6 1/K", Dimension::thermal_expansion, 23.8e-6);
  is("23.8e-6 /K", Dimension::thermal_expansion, 23.8e-6);
  is("23.8e-6 K-1", Dimension::thermal_expansion, 23.8e-6);
  is("1e9 N/m3", Dimension::bed_stiffness, 1e9);
  is("1 N/mm³", Dimension::bed_stiffness, 1e9);
  is("30 kN/mm", Dimension::force_per_length, 30e6);
  is("6.6e7 N m2", Dimension::bending_stiffness, 6.6e7);
  is("6.6e4 kN·m²", Dimension::bending_stiffness, 6.6e7);
  is("2 kN m/rad", Dimension::rotational_stiffness, 2e3);
  is("1 kN m/deg", Dimension::rotational_stiffness, 180e3 / std::numbers::pi);
  is("2 kN", Dimension::rotational_stiffness_per_length, 2e3);
  is("12 Hz", Dimension::frequency, 12.0);
  is("8 %", Dimension::none, 0.08);
  is("0.33", Dimension::none, 0.33);
  CHECK(quantity_in_si("0 mm", Dimension::length) == 0.0);
}

TEST_CASE("A quantity that is not what it should be is refused and explained", "[unit][quantity]")
{
  const auto says = [](const char* text, Dimension dimension, const char* reason)
  {
    CAPTURE(text);
    CHECK_THROWS_AS(quantity_in_si(text, dimension), carlin::ValueError);
    CHECK_THROWS_WITH(quantity_in_si(text, dimension), Contains(reason));
  };
  says("6", Dimension::length, "'6' is not a length: it has no unit; write e.g. '6 mm'");
  says("6 kg", Dimension::length, "'kg' is a unit of something else");
  says("6 furlongues", Dimension::length, "unit 'furlongues' is not known");
  says("six mm", Dimension::length, "does not start with a number");
  says("", Dimension::length, "does not start with a number");
  says("nan mm", Dimension::length, "not finite");
  says(".nan", Dimension::none, "does not start with a number");
  says("inf mm", Dimension::length, "not finite");
  says("1e999 mm", Dimension::length, "not finite");
  says("1e308 km", Dimension::length, "not finite");
  says("1,5 mm", Dimension::length, "never a comma");
  says("6 7 mm", Dimension::length, "is not known");
  says("6 mm since 2000", Dimension::length, "is not known");
  says("25 kn", Dimension::speed, "knot or as kilonewton");
  says("25 Kn", Dimension::force, "knot or as kilonewton");
  says("25 kN", Dimension::speed, "is a unit of something else");
  says("25 knot", Dimension::force, "is a unit of something else");
  says("3 g", Dimension::force, "is a unit of something else");
  says("40 degC", Dimension::temperature_change, "on a scale, not a difference");
  says("-400 degC", Dimension::temperature, "below absolute zero");
  says("18", Dimension::angle, "has no unit");
  says("18 %", Dimension::angle, "is a unit of something else");
  says("5 N m deg", Dimension::moment, "is a unit of something else");
  says("0.3 mm", Dimension::none, "is not taken here");
  says("2 s", Dimension::frequency, "is a unit of something else");
}

TEST_CASE("A limit of unknown dimension is converted by its unit", "[unit][quantity]")
{
  CHECK_THAT(carlin::quantity_of_any_dimension("120 MPa"), WithinRel(120e6, 1e-12));
  CHECK_THAT(carlin::quantity_of_any_dimension("5 mm"), WithinRel(0.005, 1e-12));
  CHECK_THAT(carlin::quantity_of_any_dimension("90 %"), WithinRel(0.9, 1e-12));
  CHECK_THROWS_WITH(carlin::quantity_of_any_dimension("3 g"), Contains("gram"));
  CHECK_THROWS_WITH(carlin::quantity_of_any_dimension("3 wuzz"), Contains("no quantity"));
}

TEST_CASE("Every dimension can be written as its own example says", "[unit][quantity]")
{
  for (int i = 1; i <= static_cast<int>(Dimension::moment_of_inertia); ++i)
  {
    const auto dimension = static_cast<Dimension>(i);
    CAPTURE(carlin::name_of(dimension));
    CHECK_NOTHROW(quantity_in_si(carlin::example_of(dimension), dimension));
    CHECK_FALSE(carlin::unit_of(dimension).empty());
  }
}
