#pragma once

/// The reflecting surface: samples on a grid, each moving as a linear function of the frame's freedoms.
///
/// One operator, used both ways: displacement rows give where a sample goes; their transpose carries a force
/// on the sample to the frame, so nodal loads are work-equivalent to the pressure field and keep its total
/// force and moment to round-off. Slopes come from rotations of the ribs' axes (shape-function derivatives),
/// never from height differences.

#include <Eigen/SparseCore>
#include <vector>

#include "fem/frame.h"

namespace focalframe::models {

/// Samples are stored module by module, station (along x) by station, and in each station from the -y to the
/// +y rim.
struct Skin {
  int modules = 0, stations = 0, rows = 0;  ///< stations per module, samples per station
  std::vector<double> row_y;                ///< lateral position of each row [m], ascending
  std::vector<double> row_weight;           ///< projected width each row stands for [m]; sums to the aperture
  std::vector<double> station_x;            ///< all modules' stations [m]
  std::vector<double> station_weight;       ///< length each station stands for [m]
  int stations_per_bay = 0;                 ///< bay: from rib to rib
  double bay = 0;                           ///< its length [m]
  std::vector<double> bay_share;            ///< where in its bay each station of a bay lies, 0 .. 1
  Eigen::SparseMatrix<double, Eigen::RowMajor>
      move;  ///< (3 #samples) x (6 #nodes): displacement x y z per sample
  Eigen::SparseMatrix<double, Eigen::RowMajor> turn;  ///< (2 #samples) x (6 #nodes): rotation of the mirror
                                                      ///< about x and about y per sample [rad]
  Eigen::SparseMatrix<double, Eigen::RowMajor> vertex_move;  ///< (3 #stations) x (6 #nodes): the vertex line

  int samples() const { return modules * stations * rows; }
  int sample(int station, int row) const {
    return station * rows + row;
  }  ///< station counts over all modules
  int module_of_station(int station) const { return station / stations; }
  int bays() const { return stations / stations_per_bay; }  ///< in one module
};

/// Height of the parabola at a row and the outward (towards the focus) normal times dA / dA_projected: (0,
/// -y/2f, 1).
fem::Vec3 surface_point(double x, double y, double focal_length);
fem::Vec3 area_normal(double y, double focal_length);

}  // namespace focalframe::models
