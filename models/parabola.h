#pragma once

/// The ideal parabola of a trough's cross-section (or of a dish's meridian): z = y^2 / 4f.
///
/// Axes are the collector's: y across the aperture, z along the optical axis, vertex at the origin, focus at
/// (0, f). All angles are positive from y towards z, that is about +x. Closed forms, no approximation.

namespace focalframe::models {

struct Parabola {
  double width = 0;         ///< full aperture width, or the dish's diameter [m]
  double focal_length = 0;  ///< vertex to focus [m]

  double height(double y) const;       ///< of the mirror above the vertex [m]
  double slope_angle(double y) const;  ///< of the mirror; also the incidence angle of an axial ray [rad]
  double ray_angle(double y) const;  ///< phi: at the focus, from the axis to the mirror point; odd in y [rad]
  double local_focal_distance(double y) const;  ///< r: mirror point to focus [m]

  double rim_angle() const;                  ///< phi at the rim [rad]
  double depth() const;                      ///< height of the rim above the vertex [m]
  double arc_length() const;                 ///< rim to rim along the mirror [m]
  double mean_local_focal_distance() const;  ///< mean of r over the flat aperture of a trough [m]
};

/// f = width^2 / (16 depth) [m].
double focal_length_from_depth(double width, double depth);

/// Aperture width over the circumference of a round receiver [-]; the other usual ratio is
/// aperture_ratio. Always say which one is printed.
double concentration(const Parabola& parabola, double receiver_diameter);

/// Aperture width over receiver diameter [-].
double aperture_ratio(const Parabola& parabola, double receiver_diameter);

/// Diameter of the smallest round receiver that catches a cone of this half angle from a perfect trough [m].
double least_receiver_diameter(const Parabola& parabola, double half_angle);

}  // namespace focalframe::models
