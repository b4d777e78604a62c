#include "models/action_loads.h"

#include <algorithm>
#include <cmath>

#include "fem/units.h"
#include "loads/pose.h"
#include "loads/seismic.h"
#include "loads/snow.h"
#include "models/wind_load.h"

namespace focalframe::models {
namespace {

using Eigen::Vector3d;
using Eigen::VectorXd;
using loads::Action;

VectorXd nothing(const RowModel& row) { return VectorXd::Zero(row.columns().all()); }

// A force in world axes on a pair of unit cases along collector y and z.
void put(const RowModel& row, VectorXd& a, int along_y, int along_z, const Vector3d& collector) {
  a[row.columns().unit(along_y)] += collector.y();
  a[row.columns().unit(along_z)] += collector.z();
}

Vector3d down(double elevation, double amount) {
  return loads::world_to_collector(elevation) * Vector3d(0, 0, -amount);
}

loads::Aperture aperture_of(const RowModel& row) {
  return {row.collector().width, row.collector().focal_length, false};
}

loads::SnowOnBack on_back(const TroughDesign& d) {
  return d.snow.back == "holds" ? loads::SnowOnBack::holds : loads::SnowOnBack::sheds;
}

// A load per area of the aperture (along y and z), by stations. `wanted`: its weight per length, met by a
// factor, because straight lines between stations miss the kinks of snow and the edge of water.
template <class Load>
VectorXd heap(const RowModel& row, double elevation, double wanted, Load&& load) {
  VectorXd a = nothing(row);
  const std::vector<double>& stations = row.units().heap_stations;
  const Vector3d downwards = down(elevation, 1);
  const double width = row.collector().width, length = row.collector().mirror_area / width;
  double weight = 0;
  for (std::size_t i = 0; i < stations.size(); ++i) {
    const Vector3d value = load(stations[i] * width);
    const int along_y = row.heap(static_cast<int>(i), false), along_z = row.heap(static_cast<int>(i), true);
    a[along_y] = value.y();
    a[along_z] = value.z();
    weight += value.y() * row.load_totals()(0, along_y) * downwards.y() +
              value.z() * row.load_totals()(1, along_z) * downwards.z();
  }
  return weight > 0 ? VectorXd(a * (wanted * length / weight)) : a;
}

void add_snow(const TroughDesign& d, const RowModel& row, double elevation, std::vector<OtherLoad>& out) {
  const loads::Aperture aperture = aperture_of(row);
  if (!std::isnan(d.snow.on_ground)) {
    const loads::SnowArea area = loads::snow_area(aperture, elevation, on_back(d));
    if (area.area > 0)
      out.push_back({Action::snow, "snow",
                     heap(row, elevation, d.snow.on_ground * area.area, [&](double y) -> Vector3d {
                       return d.snow.on_ground * loads::snow_cover(aperture, elevation, y, on_back(d)) *
                              down(elevation, 1);
                     })});
  }
  if (d.water.drains != "blocked") return;
  const loads::HeldWater water = loads::held_water(aperture, elevation);
  if (water.amount <= 0) return;
  const double weight = loads::water_density * standard_gravity * water.amount;
  out.push_back({Action::snow, "standing water", heap(row, elevation, weight, [&](double y) -> Vector3d {
                   return -loads::water_pressure(aperture, elevation, y) *
                          area_normal(y, aperture.focal_length);
                 })});
}

void add_ice(const TroughDesign& d, const RowModel& row, double elevation, std::vector<OtherLoad>& out) {
  const UnitNumbers& at = row.units().at;
  if (std::isnan(d.ice.thickness) || at.ice_y < 0) return;
  VectorXd a = nothing(row);
  put(row, a, at.ice_y, at.ice_z, down(elevation, standard_gravity));
  out.push_back({Action::ice, "ice", a});
}

// Hottest and coldest frame, with the mirror's side warmer than the back where the design says so; at night
// the gradient turns round.
std::vector<OtherLoad> temperatures(const TroughDesign& d, const RowModel& row) {
  std::vector<OtherLoad> out;
  const TemperatureInput& t = d.temperature;
  const UnitNumbers& at = row.units().at;
  if (std::isnan(t.set_at) || at.warm < 0) return out;
  const auto way = [&](const char* name, double warm, double lit) {
    VectorXd a = nothing(row);
    a[row.columns().unit(at.warm)] = warm;
    a[row.columns().unit(at.frame_gradient)] = lit * t.across_frame;
    a[row.columns().unit(at.receiver_gradient)] = std::max(0.0, lit) * t.across_receiver;
    out.push_back({Action::temperature, name, a});
  };
  way("hottest frame", t.most - t.set_at, 1);
  way("coldest frame", t.least - t.set_at, t.across_frame > 0 ? -1 : 0);
  return out;
}

void add_earthquake(const TroughDesign& d, const RowModel& row, double elevation,
                    std::vector<OtherLoad>& out) {
  const double a0 = design_acceleration(d.earthquake);
  if (std::isnan(a0) || row.units().at.push_x < 0) return;
  const Columns& at = row.columns();
  for (double way : {1.0, -1.0}) {
    VectorXd across = nothing(row), along = nothing(row);
    const Vector3d push = loads::world_to_collector(elevation) * Vector3d(0, way * a0, 0);
    across[Columns::gravity_y] = push.y();
    across[Columns::gravity_z] = push.z();
    across[at.stand_push_y()] = way * a0;
    along[at.unit(row.units().at.push_x)] = way * a0;
    along[at.stand_push_x()] = way * a0;
    out.push_back({Action::seismic, way > 0 ? "earthquake towards +Y" : "earthquake towards -Y", across});
    out.push_back({Action::seismic, "earthquake along the row", along});
  }
}

}  // namespace

std::vector<OtherLoad> other_loads(const TroughDesign& d, const RowModel& row, const State& state) {
  std::vector<OtherLoad> out;
  if (state.kind == StateKind::maintenance) {
    for (const PersonPlace& p : row.units().person) {
      VectorXd a = nothing(row);
      put(row, a, p.y, p.z, down(state.elevation, d.maintenance.load));
      out.push_back({Action::imposed, "person on the " + p.where, a});
    }
    return out;
  }
  const bool still = state.kind != StateKind::turning && state.kind != StateKind::unfinished;
  if (still) add_snow(d, row, state.elevation, out);
  if (still) add_ice(d, row, state.elevation, out);
  for (OtherLoad& t : temperatures(d, row)) out.push_back(std::move(t));
  if (state.kind == StateKind::operate || state.kind == StateKind::stow)
    add_earthquake(d, row, state.elevation, out);
  return out;
}

std::vector<OtherLoad> optical_temperatures(const TroughDesign& d, const RowModel& row) {
  return temperatures(d, row);
}

VectorXd unfinished_weight(const RowModel& row, double elevation, int side) {
  VectorXd a = weight_amplitudes(row, elevation);
  const UnitNumbers& at = row.units().at;
  const Vector3d up = -down(elevation, standard_gravity);
  if (side == 0 || side == 1) put(row, a, at.minus_y, at.minus_z, up);
  if (side == 0 || side == -1) put(row, a, at.plus_y, at.plus_z, up);
  return a;
}

ActionAmounts action_amounts(const TroughDesign& d, const RowModel& row, double elevation) {
  ActionAmounts out;
  const loads::Aperture aperture = aperture_of(row);
  if (!std::isnan(d.snow.on_ground)) {
    const loads::SnowArea area = loads::snow_area(aperture, elevation, on_back(d));
    out.snow_per_length = d.snow.on_ground * area.area;
    out.snow_lever = area.centre_y;
  }
  if (d.water.drains == "blocked")
    out.water_per_length =
        loads::water_density * standard_gravity * loads::held_water(aperture, elevation).amount;
  if (row.units().at.ice_z >= 0)
    out.ice_mass = row.load_totals()(1, row.columns().unit(row.units().at.ice_z));
  out.earthquake = design_acceleration(d.earthquake);
  return out;
}

double design_acceleration(const EarthquakeInput& q) {
  const bool asce = q.code == "ASCE 7";
  if (std::isnan(asce ? q.s_ds : q.ground_acceleration)) return not_given;
  const auto at = [&](double period) {
    if (asce)
      return loads::seismic_acceleration(
          loads::SeismicAsce{q.s_ds, std::isnan(q.s_d1) ? q.s_ds : q.s_d1, q.response, q.importance, period});
    const auto ground = static_cast<loads::GroundType>(q.ground.empty() ? 1 : q.ground[0] - 'A');
    return loads::seismic_acceleration(loads::SeismicEn{q.ground_acceleration, ground, q.behaviour, period});
  };
  if (!std::isnan(q.period)) return at(q.period);
  double greatest = 0;
  for (int i = 1; i <= 100; ++i) greatest = std::max(greatest, at(0.02 * i));
  return greatest;
}

double post_drop(double shift, double height) { return shift * shift / (2 * height); }

}  // namespace focalframe::models
