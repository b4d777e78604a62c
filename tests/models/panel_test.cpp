// Mirror panels between their supports: closed forms of strips and plates, laws of the curved sheet.

#include <catch2/catch.hpp>
#include <cmath>

#include "models/panel_shell.h"
#include "models/panel_span.h"
#include "models/quadrature.h"

using namespace focalframe::models;

namespace {

// Glass of 4 mm: E 70 GPa, nu 0.22; 600 Pa over spans of 0.8 m (computed here from the closed forms).
constexpr double rigidity = 392.322, pressure = 600, pitch = 0.8;

// `spans` equal spans with two Gauss rows in each of `parts` elements per span.
StripInput strip(int spans, int parts) {
  StripInput in;
  in.rigidity = rigidity;
  for (int k = 0; k <= spans; ++k) in.support_s.push_back(k * pitch);
  in.edge_s = {0, spans * pitch};
  for (int e = 0; e <= spans * parts; ++e) in.node_s.push_back(e * pitch / parts);
  const Quadrature rule = gauss_legendre(2, spans * parts, 0, spans * pitch);
  in.row_s = rule.point;
  in.row_ds = rule.weight;
  return in;
}

Eigen::VectorXd even(const StripInput& in) {
  return Eigen::VectorXd::Constant(static_cast<Eigen::Index>(in.row_s.size()), pressure);
}

ShellInput shell(double focal_length, double width, int elements) {
  ShellInput in;
  in.parabola = {width, focal_length};
  in.pitch = pitch;
  in.poisson = 0.22;
  in.rigidity = rigidity;
  in.membrane = 70e9 * 0.004 / (1 - 0.22 * 0.22);
  for (int e = 0; e <= elements; ++e) in.node_y.push_back(width * (static_cast<double>(e) / elements - 0.5));
  const Quadrature rule = gauss_legendre(2, elements, -width / 2, width / 2);
  in.row_y = rule.point;
  for (std::size_t i = 0; i < rule.point.size(); ++i)
    in.row_ds.push_back(rule.weight[i] * std::hypot(1, rule.point[i] / (2 * focal_length)));
  return in;
}

Eigen::VectorXd even_normal(const ShellInput& in, double value) {
  Eigen::VectorXd p = Eigen::VectorXd::Zero(2 * static_cast<Eigen::Index>(in.row_y.size()));
  p.head(p.size() / 2).setConstant(value);
  return p;
}

}  // namespace

TEST_CASE("the deflected line of an even load is that of the handbooks", "[panel]") {
  CHECK(span_line({false, false}, 0.5) == Approx(5.0 / 384));
  CHECK(span_line({true, true}, 0.5) == Approx(1.0 / 384));
  CHECK(span_line({false, true}, 0.421535) == Approx(0.00541612).epsilon(1e-5));
  CHECK(span_line({true, false}, 1 - 0.421535) == Approx(0.00541612).epsilon(1e-5));
  CHECK(span_line({false, false}, 0, 1) == Approx(1.0 / 24));
  CHECK(span_line({true, true}, (1 - 1 / std::sqrt(3)) / 2, 1) == Approx(1 / (72 * std::sqrt(3))));
  CHECK(span_means({false, false}).rms_slope == Approx(std::sqrt(17.0 / 35) / 24));
  CHECK(span_means({true, true}).rms_slope == Approx(1 / (12 * std::sqrt(210.0))));
  CHECK(span_means({true, true}).mean == Approx(1.0 / 720));
}

TEST_CASE("a strip pinned on two ribs and one running on over many have the sags and slopes of closed form",
          "[panel]") {
  // 5 q b^4 / 384 D, q b^3 sqrt(17/35) / 24 D; q b^4 / 384 D, q b^3 / (12 sqrt 210 D).
  const auto rms = [](const Eigen::VectorXd& slope, std::size_t from, std::size_t count) {
    return std::sqrt(slope.segment(static_cast<Eigen::Index>(from), static_cast<Eigen::Index>(count))
                         .array()
                         .square()
                         .mean());
  };
  const StripInput one = strip(1, 8);
  const StripAnswer pinned = solve_strip(one);
  CHECK((pinned.deflection * even(one)).maxCoeff() == Approx(8.15657e-3).epsilon(0.01));
  CHECK(rms(pinned.slope * even(one), 0, one.row_s.size()) == Approx(2.27383e-2).epsilon(1e-4));
  const StripInput many = strip(15, 8);
  const StripAnswer running = solve_strip(many);
  CHECK((running.deflection * even(many)).segment(7 * 16, 16).maxCoeff() == Approx(1.63131e-3).epsilon(0.01));
  CHECK(rms(running.slope * even(many), 7 * 16, 16) == Approx(4.50286e-3).epsilon(1e-3));
}

TEST_CASE("supports of two, three and four equal spans carry what the handbooks say", "[panel]") {
  // Reactions over q b: 0.375, 1.25; 0.4, 1.1; 11/28, 32/28, 26/28.
  const double wanted[3][3] = {{0.375, 1.25, 0.375}, {0.4, 1.1, 1.1}, {11 / 28.0, 32 / 28.0, 26 / 28.0}};
  for (int spans = 2; spans <= 4; ++spans) {
    const StripInput in = strip(spans, 4);
    const Eigen::VectorXd push = solve_strip(in).reaction * even(in);
    for (int k = 0; k < 3; ++k)
      CHECK(push[k] / (pressure * pitch) == Approx(wanted[spans - 2][k]).epsilon(1e-9));
    CHECK(push.sum() == Approx(pressure * pitch * spans));
  }
}

TEST_CASE("a strip whose supports all settle alike moves without bending, and facets tilt with theirs",
          "[panel]") {
  StripInput in = strip(3, 4);
  in.edge_s = {0, 1.2, 2.4};  // two facets, each on two supports
  const StripAnswer answer = solve_strip(in);
  const Eigen::VectorXd all = Eigen::VectorXd::Ones(4);
  CHECK((answer.settled_deflection * all - Eigen::VectorXd::Ones(answer.settled_deflection.rows())).norm() <
        1e-9);
  CHECK((answer.settled_slope * all).norm() < 1e-9);
  const Eigen::VectorXd slope = answer.settled_slope * Eigen::Vector4d(0, 1e-3, 0, 0);
  for (std::size_t r = 0; r < in.row_s.size(); ++r)
    CHECK(slope[static_cast<Eigen::Index>(r)] == Approx(in.row_s[r] < 1.2 ? 1e-3 / pitch : 0).margin(1e-9));
  in.edge_s = {0, 0.5, 2.4};
  CHECK_THROWS_AS(solve_strip(in), std::invalid_argument);
}

TEST_CASE("a flat sheet over ribs is the plate strip of closed form", "[panel]") {
  for (const SpanEnds ends : {SpanEnds{true, true}, SpanEnds{false, true}, SpanEnds{false, false}}) {
    ShellInput in = shell(1e5, 1.0, 8);
    in.ends = ends;
    in.poisson = 0;  // a strip of finite width bends to a saddle; without Poisson's ratio it does not
    const Eigen::VectorXd line = solve_shell(in).normal * even_normal(in, pressure);
    const double expected = pressure * std::pow(pitch, 4) / rigidity;
    CHECK(line.minCoeff() == Approx(expected).epsilon(1e-6));
    CHECK(line.maxCoeff() == Approx(expected).epsilon(1e-6));
  }
}

TEST_CASE("an unknown membrane leaves the flat strip, an upper bound to every curved sheet", "[panel]") {
  ShellInput in = shell(0.8, 2.0, 16);
  const Eigen::VectorXd p = even_normal(in, pressure);
  const Eigen::VectorXd curved = solve_shell(in).normal * p;
  in.membrane = 0;
  const Eigen::VectorXd flat = solve_shell(in).normal * p;
  CHECK(curved.cwiseAbs().maxCoeff() < flat.cwiseAbs().maxCoeff());
  CHECK(std::abs(curved[curved.size() / 2]) < 0.05 * flat[flat.size() / 2]);
}

TEST_CASE("a narrow trough of sheet spans like a beam of its own cross-section", "[panel]") {
  // Long and narrow: arc 0.2 m wide, spans of 6 m, held ends: q W b^4 / 384 E I with the arc's own I.
  ShellInput in = shell(0.2, 0.2, 16);
  in.pitch = 6;
  in.poisson = 0;
  in.membrane = 70e9 * 0.004;
  double area = 0, first = 0, second = 0, load = 0;
  for (std::size_t r = 0; r < in.row_y.size(); ++r) {
    const double z = in.row_y[r] * in.row_y[r] / (4 * 0.2), a = in.row_ds[r] * 0.004;
    area += a;
    first += a * z;
    second += a * z * z;
    load += in.row_ds[r] / std::hypot(1, in.row_y[r] / 0.4);
  }
  const double inertia = second - first * first / area + area * 0.004 * 0.004 / 12;
  const double middle = (solve_shell(in).normal * even_normal(in, 10))[15] * span_line({}, 0.5);
  // Shear and the opening of the profile add a little.
  CHECK(middle == Approx(10 * load * std::pow(6.0, 4) / (384 * 70e9 * inertia)).epsilon(0.05));
}

TEST_CASE("work is the same both ways: pressure at one row and deflection at another", "[panel]") {
  const ShellInput in = shell(0.8, 2.0, 12);
  const ShellAnswer answer = solve_shell(in);
  const auto rows = static_cast<Eigen::Index>(in.row_y.size());
  Eigen::MatrixXd work(2 * rows, 2 * rows);
  work << answer.normal, answer.tangential;
  for (Eigen::Index i = 0; i < 2 * rows; ++i) work.row(i) *= in.row_ds[static_cast<std::size_t>(i % rows)];
  CHECK((work - work.transpose()).norm() < 1e-7 * work.norm());
}

TEST_CASE("halving the elements of a curved sheet changes its rim's sag by little", "[panel]") {
  const auto rim = [](int elements) {
    ShellInput in = shell(0.8, 2.0, elements);
    return (solve_shell(in).normal * even_normal(in, pressure)).cwiseAbs().maxCoeff();
  };
  CHECK(rim(48) == Approx(rim(96)).epsilon(0.02));
}

TEST_CASE("a thicker sheet and closer ribs sag less", "[panel]") {
  const auto most = [](double factor, double rib_pitch) {
    ShellInput in = shell(0.8, 2.0, 24);
    in.rigidity *= factor * factor * factor;
    in.membrane *= factor;
    in.pitch = rib_pitch;
    return span_line({}, 0.5) * (solve_shell(in).normal * even_normal(in, pressure)).cwiseAbs().maxCoeff();
  };
  CHECK(most(1.5, 0.8) < 0.5 * most(1, 0.8));
  CHECK(most(1, 0.4) < 0.3 * most(1, 0.8));
}
