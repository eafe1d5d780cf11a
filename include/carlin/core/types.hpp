#pragma once

#include <Eigen/Dense>
#include <Eigen/Sparse>

/// Carlin: tanks in a hull. All quantities are SI: m, kg, s, N, Pa, rad, K.
/// Axes of the boat: x forward from the transom, y to port, z up, right-handed.
namespace carlin
{
using Index = Eigen::Index;
using Vector2 = Eigen::Vector2d;
using Vector3 = Eigen::Vector3d;
using Vector6 = Eigen::Matrix<double, 6, 1>;
using Vector12 = Eigen::Matrix<double, 12, 1>;
using Vector24 = Eigen::Matrix<double, 24, 1>;
using Matrix2 = Eigen::Matrix2d;
using Matrix3 = Eigen::Matrix3d;
using Matrix6 = Eigen::Matrix<double, 6, 6>;
using Matrix12 = Eigen::Matrix<double, 12, 12>;
using Matrix24 = Eigen::Matrix<double, 24, 24>;
using VectorX = Eigen::VectorXd;
using MatrixX = Eigen::MatrixXd;
using SparseMatrix = Eigen::SparseMatrix<double>; ///< column-major, 32-bit indices

inline constexpr double standard_gravity = 9.80665; ///< [m/s^2], ISO 80000-3
inline constexpr double sea_water_density = 1025.0; ///< [kg/m^3], loads book, common practice
inline constexpr Index freedoms_per_node = 6;       ///< u_x u_y u_z r_x r_y r_z, global axes
} // namespace carlin
