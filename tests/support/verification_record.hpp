#pragma once

#include <string_view>

/// Lines of the verification table, collected from a run.
namespace carlin::testing
{
/// Why a tolerance is what it is.
enum class ToleranceClass
{
  round_off,      ///< the element contains the solution
  printing,       ///< half a unit of the last printed digit
  discretisation, ///< the error expected at this mesh
};

/// One comparison with a published or independently computed value.
struct VerificationRecord
{
  std::string_view subject;  ///< case and mesh: "C4.1 Scordelis-Lo roof, 16 x 16"
  std::string_view source;   ///< who published or how it was computed
  std::string_view quantity; ///< what is compared, with its unit
  double published = 0.0;
  double computed = 0.0;
  ToleranceClass tolerance = ToleranceClass::discretisation;
};

/// Appends "subject,source,quantity,published,computed,relative error,tolerance class" to the file
/// named by the environment variable CARLIN_VERIFICATION_CSV; does nothing if it is not set.
/// @return The relative error, (computed - published) / |published|.
/// @throws std::runtime_error if the file cannot be written.
double record(const VerificationRecord& line);
} // namespace carlin::testing
