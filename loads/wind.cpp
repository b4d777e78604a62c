#include "loads/wind.h"

#include <algorithm>
#include <cmath>
#include <stdexcept>

#include "loads/averaging.h"
#include "loads/number_text.h"
#include "loads/profile.h"

namespace focalframe::loads {

namespace {

// Averagings up to here are gusts: brought to 3 s first, then to the mean by the profile's own gust ratio.
constexpr double longest_gust = 10;
constexpr double gust_averaging = 3, mean_averaging = 600;

using Chain = std::vector<ChainStep>;

void require(bool holds, const std::string& message) {
  if (!holds) throw std::invalid_argument(message);
}

void validate(double height, const StatedWind& wind, const Site& site) {
  require(height > 0, "height of the axis " + number_text(height) + " m must be > 0");
  require(std::isnan(wind.speed) != std::isnan(wind.pressure),
          "give either a wind speed or a velocity pressure");
  require(std::isnan(wind.speed) || wind.speed >= 0,
          "wind speed " + number_text(wind.speed) + " m/s must be >= 0");
  require(std::isnan(wind.pressure) || wind.pressure >= 0,
          "velocity pressure " + number_text(wind.pressure) + " Pa must be >= 0");
  require(wind.averaging >= 1 && wind.averaging <= 3600,
          "the averaging time must be given, between 1 s and 3600 s; found " + number_text(wind.averaging));
  require(wind.height > 0, "height of the stated wind " + number_text(wind.height) + " m must be > 0");
  require(site.orography >= 0.5 && site.orography <= 2,
          "orography factor " + number_text(site.orography) + " on the speed must lie between 0.5 and 2");
}

std::string metres(double z) { return number_text(z) + " m"; }

double push(Chain& chain, const std::string& what, double value, const std::string& unit,
            const std::string& how) {
  chain.push_back({what, value, unit, how});
  return value;
}

// How the stated terrain and orography look where the speed was stated.
Site stated_site(const StatedWind& wind, const Site& site) {
  if (wind.over == StatedOver::site || site.terrain == Terrain::power_law) return site;
  Site open = site;
  open.orography = 1;
  open.terrain = is_en(site.terrain) ? Terrain::en_2 : Terrain::asce_c;
  return open;
}

double push_stated(Chain& chain, const StatedWind& wind, const Site& where) {
  return push(chain, "stated speed", wind.speed, "m/s",
              "mean over " + number_text(wind.averaging) + " s, " + metres(wind.height) +
                  " above ground, over " +
                  (wind.over == StatedOver::site ? "the site's own ground (" : "open country (") +
                  terrain_name(where.terrain) + ")");
}

double push_averaging(Chain& chain, double speed, double from, double to, GustMethod method,
                      double turbulence, const std::string& what) {
  if (from == to) return speed;
  const ChainStep factor = averaging_factor({.from = from, .to = to}, method, turbulence);
  return push(chain, what, speed * factor.value, "m/s",
              "x " + number_text(factor.value) + " = " + factor.how);
}

// z is raised to zmin below it, and the text says so.
std::string log_text(const EnTerrain& t, double z) {
  return "ln(" + number_text(std::max(z, t.zmin)) + (z < t.zmin ? " [zmin]" : "") + " / " +
         number_text(t.z0) + ")";
}

std::string turbulence_text(const Site& site, double z) {
  if (is_asce(site.terrain)) return asce_turbulence_text(site.terrain, z);
  if (is_en(site.terrain))
    return "1 / (c_o ln(z / z0)) = 1 / (" + number_text(site.orography) + " " +
           log_text(en_terrain(site.terrain), z) + ") (EN 1991-1-4, 4.4)";
  return std::isnan(site.turbulence)
             ? "not given: equal to the exponent, as in a logarithmic profile, where both are 1 / ln(z / z0)"
             : "as given, at the axis";
}

double turbulence_at(double height, const Site& site) {
  if (is_asce(site.terrain)) return asce_turbulence(site.terrain, height);
  if (is_en(site.terrain))
    return en_turbulence(en_terrain(site.terrain), {.height = height, .orography = site.orography});
  return std::isnan(site.turbulence) ? site.power_exponent : site.turbulence;
}

// EN terrain and power law: the stated speed as a 10 min mean at its own height.
double push_mean_at_stated(Chain& chain, const StatedWind& wind, double turbulence, const std::string& how) {
  if (wind.averaging > longest_gust)
    return push_averaging(chain, wind.speed, wind.averaging, mean_averaging, wind.method, turbulence,
                          "10 min mean at " + metres(wind.height));
  const double gust = push_averaging(chain, wind.speed, wind.averaging, gust_averaging, wind.method,
                                     turbulence, "3 s gust at " + metres(wind.height));
  const double ratio = en_gust_ratio(turbulence);
  return push(chain, "10 min mean at " + metres(wind.height), gust / ratio, "m/s",
              "gust / sqrt(1 + 7 Iv) = " + number_text(gust) + " / " + number_text(ratio) + ", Iv(" +
                  metres(wind.height) + ") = " + (how.empty() ? "" : how + " = ") + number_text(turbulence) +
                  " (EN 1991-1-4, 4.5)");
}

// v_b from the stated wind. Over open country the speed at 10 m is v_b by definition, though c_r(10 m) of
// terrain II is 1.007; at other heights the ratio of c_r is used, so that nothing jumps at 10 m.
double push_basic(Chain& chain, const StatedWind& wind, const Site& where) {
  const EnTerrain t = en_terrain(where.terrain);
  const double iv = turbulence_at(wind.height, where);
  push_stated(chain, wind, where);
  const double mean = push_mean_at_stated(chain, wind, iv, turbulence_text(where, wind.height));
  const double cr = en_roughness(t, wind.height);
  if (wind.over == StatedOver::site)
    return push(chain, "basic wind v_b", mean / (cr * where.orography), "m/s",
                "mean / (c_r c_o), c_r(" + metres(wind.height) + ") = " + number_text(t.kr) + " " +
                    log_text(t, wind.height) + " = " + number_text(cr) +
                    ", c_o = " + number_text(where.orography));
  const double cr10 = en_roughness(t, 10);
  return push(chain, "basic wind v_b", mean * cr10 / cr, "m/s",
              wind.height == 10 ? "10 min mean 10 m above open country: v_b by definition (EN 1991-1-4, 4.2)"
                                : "x c_r(10 m) / c_r(" + metres(wind.height) + ") = " + number_text(cr10) +
                                      " / " + number_text(cr) + ", terrain II");
}

void en_speed(WindAtHeight& w, const StatedWind& wind, const Site& site) {
  const EnTerrain t = en_terrain(site.terrain);
  const double vb = push_basic(w.chain, wind, stated_site(wind, site));
  push(w.chain, "terrain factor k_r", t.kr, "-",
       "0.19 (z0 / 0.05 m)^0.07, z0 = " + number_text(t.z0) + " m (" + terrain_name(site.terrain) + ")");
  const double cr = push(w.chain, "roughness factor c_r", en_roughness(t, w.height), "-",
                         number_text(t.kr) + " " + log_text(t, w.height) + " (EN 1991-1-4, 4.3.2)");
  w.mean_speed = push(w.chain, "mean speed at the axis", cr * site.orography * vb, "m/s",
                      "c_r c_o v_b = " + number_text(cr) + " x " + number_text(site.orography) + " x " +
                          number_text(vb) + " (10 min)");
  w.turbulence = push(w.chain, "turbulence intensity Iv", turbulence_at(w.height, site), "-",
                      turbulence_text(site, w.height));
}

void power_law_speed(WindAtHeight& w, const StatedWind& wind, const Site& site) {
  require(site.power_exponent > 0 && site.power_exponent < 0.6,
          "power-law exponent " + number_text(site.power_exponent) + " must lie between 0 and 0.6");
  const bool given = !std::isnan(site.turbulence);
  w.turbulence = turbulence_at(w.height, site);
  require(w.turbulence >= 0 && w.turbulence < 1, "turbulence intensity must lie between 0 and 1");
  push_stated(w.chain, wind, site);
  push(w.chain, "turbulence intensity Iv", w.turbulence, "-", turbulence_text(site, w.height));
  const double growth = std::pow(w.height / wind.height, site.power_exponent);
  // A given Iv belongs to the axis; the standard deviation behind it is taken as the same at the stated
  // height.
  const double mean =
      push_mean_at_stated(w.chain, wind, given ? w.turbulence * growth : w.turbulence,
                          given ? "Iv at the axis x (" + number_text(w.height) + " / " +
                                      number_text(wind.height) + ")^" + number_text(site.power_exponent)
                                : "");
  const double co = wind.over == StatedOver::site ? 1.0 : site.orography;
  w.mean_speed = push(w.chain, "mean speed at the axis", mean * growth * co, "m/s",
                      number_text(mean) + " x (" + number_text(w.height) + " / " + number_text(wind.height) +
                          ")^" + number_text(site.power_exponent) + " x " + number_text(co) +
                          " (10 min, power law, orography)");
}

void asce_speed(WindAtHeight& w, const StatedWind& wind, const Site& site) {
  const Site where = stated_site(wind, site);
  push_stated(w.chain, wind, where);
  const double iz = asce_turbulence(site.terrain, w.height);
  const double gust =
      push_averaging(w.chain, wind.speed, wind.averaging, gust_averaging, wind.method,
                     asce_turbulence(where.terrain, wind.height), "3 s gust at " + metres(wind.height));
  // Kz = 1 at 10 m over open country by definition of the map; the formula gives 1.001 there.
  const double reference =
      asce_kz(where.terrain, wind.height, site.asce_edition) * where.orography * where.orography /
      (wind.over == StatedOver::site ? 1.0 : asce_kz(Terrain::asce_c, 10, site.asce_edition));
  const double basic =
      wind.over != StatedOver::site && wind.height == 10
          ? gust
          : push(w.chain, "3 s gust at 10 m, exposure C", gust / std::sqrt(reference), "m/s",
                 "gust / sqrt(" + number_text(reference) + "), Kz Kzt at the stated height: " +
                     asce_kz_text(where.terrain, wind.height, site.asce_edition));
  const double kz =
      push(w.chain, "exposure coefficient Kz", asce_kz(site.terrain, w.height, site.asce_edition), "-",
           asce_kz_text(site.terrain, w.height, site.asce_edition));
  w.gust_speed = push(w.chain, "gust speed at the axis", basic * std::sqrt(kz) * site.orography, "m/s",
                      number_text(basic) + " x sqrt(Kz) x " + number_text(site.orography) +
                          " (sqrt(Kzt)); the code's directionality factor is not applied");
  w.turbulence = push(w.chain, "turbulence intensity Iz", iz, "-", turbulence_text(site, w.height));
  w.mean_speed = push_averaging(w.chain, w.gust_speed, gust_averaging, mean_averaging, wind.method, iz,
                                "mean speed at the axis");
}

void push_pressures(WindAtHeight& w) {
  w.mean_pressure =
      push(w.chain, "mean velocity pressure", 0.5 * w.density * w.mean_speed * w.mean_speed, "Pa",
           "0.5 rho V^2 = 0.5 x " + number_text(w.density) + " x " + number_text(w.mean_speed) + "^2");
}

// EN's gust pressure is a factor on the pressure; the speed follows.
void push_en_gust(WindAtHeight& w) {
  w.gust_pressure = push(w.chain, "gust velocity pressure", (1 + 7 * w.turbulence) * w.mean_pressure, "Pa",
                         "(1 + 7 Iv) x mean pressure = " + number_text(1 + 7 * w.turbulence) + " x " +
                             number_text(w.mean_pressure) + " (EN 1991-1-4, 4.5)");
  w.gust_speed = push(w.chain, "gust speed at the axis", w.mean_speed * en_gust_ratio(w.turbulence), "m/s",
                      "mean x sqrt(1 + 7 Iv) (3 s)");
}

// A pressure is stated at the axis itself: only its averaging has to be changed.
void from_pressure(WindAtHeight& w, const StatedWind& wind, const Site& site) {
  const double iv = turbulence_at(w.height, site);
  w.turbulence = push(w.chain, "turbulence intensity Iv", iv, "-", turbulence_text(site, w.height));
  push(w.chain, "stated velocity pressure", wind.pressure, "Pa",
       "at the axis, from a mean over " + number_text(wind.averaging) + " s");
  const double speed = push(w.chain, "speed of that pressure", std::sqrt(2 * wind.pressure / w.density),
                            "m/s", "sqrt(2 q / rho)");
  StatedWind at_axis = wind;
  at_axis.speed = speed;
  at_axis.height = w.height;
  if (is_asce(site.terrain)) {
    w.gust_speed = push_averaging(w.chain, speed, wind.averaging, gust_averaging, wind.method, iv,
                                  "gust speed at the axis");
    w.mean_speed = push_averaging(w.chain, w.gust_speed, gust_averaging, mean_averaging, wind.method, iv,
                                  "mean speed at the axis");
  } else {
    w.mean_speed = push_mean_at_stated(w.chain, at_axis, iv, "");
  }
}

}  // namespace

WindAtHeight wind_at(double height, const StatedWind& wind, const Site& site) {
  validate(height, wind, site);
  WindAtHeight w;
  w.height = height;
  const ChainStep air = air_density(site);
  w.density = air.value;
  w.chain.push_back(air);
  const bool asce = is_asce(site.terrain);
  if (!std::isnan(wind.pressure))
    from_pressure(w, wind, site);
  else if (asce)
    asce_speed(w, wind, site);
  else if (is_en(site.terrain))
    en_speed(w, wind, site);
  else
    power_law_speed(w, wind, site);
  push_pressures(w);
  if (asce)
    w.gust_pressure =
        push(w.chain, "gust velocity pressure", 0.5 * w.density * w.gust_speed * w.gust_speed, "Pa",
             "0.5 rho V^2 of the gust = 0.5 x " + number_text(w.density) + " x " + number_text(w.gust_speed) +
                 "^2");
  else
    push_en_gust(w);
  return w;
}

double background_factor(const GatheredArea& area, const Site& site) {
  require(area.width >= 0 && area.height >= 0, "the lengths a load is gathered over must be >= 0");
  const double scale = length_scale(equivalent_en_terrain(site, area.above_ground), area.above_ground);
  return std::sqrt(1 / (1 + 0.9 * std::pow((area.width + area.height) / scale, 0.63)));
}

double size_factor(double b, double h, double height, double turbulence, const Site& site) {
  const double background = background_factor({.width = b, .height = h, .above_ground = height}, site);
  return (1 + 7 * turbulence * background) / (1 + 7 * turbulence);
}

}  // namespace focalframe::loads
