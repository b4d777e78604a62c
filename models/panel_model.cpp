#include "models/panel_model.h"

#include <algorithm>
#include <cmath>

#include "models/catalogue.h"
#include "models/panel_shell.h"
#include "models/panel_span.h"
#include "models/profile.h"
#include "models/quantity.h"
#include "models/trough_layout.h"

namespace focalframe::models {
namespace {

using Eigen::MatrixXd;

double arc_at(double y, double f) {
  const double t = y / (2 * f);
  return f * (t * std::sqrt(1 + t * t) + std::asinh(t));
}

// Rim to rim: the arm's nodes on both sides and the vertex between the tube's shoulders.
std::vector<double> cuts(const TroughLayout& at, int parts) {
  std::vector<double> half = {0};
  half.insert(half.end(), at.arm_y.begin(), at.arm_y.end());
  std::vector<double> fine = {0};
  for (std::size_t i = 0; i + 1 < half.size(); ++i)
    for (int k = 1; k <= parts; ++k) fine.push_back(half[i] + (half[i + 1] - half[i]) * k / parts);
  std::vector<double> all;
  for (auto y = fine.rbegin(); y + 1 != fine.rend(); ++y) all.push_back(-*y);
  all.insert(all.end(), fine.begin(), fine.end());
  return all;
}

std::vector<double> facet_edges(const TroughDesign& design, double width) {
  if (design.mirror.kind != "facets") return {-width / 2, width / 2};
  const int across = design.mirror.facets_across > 0 ? design.mirror.facets_across : 2;
  std::vector<double> edges;
  for (int k = 0; k <= across; ++k) edges.push_back(width * (static_cast<double>(k) / across - 0.5));
  return edges;
}

}  // namespace

PanelModel::PanelModel(const TroughDesign& design, const RowModel& row) : row_(row) {
  const MirrorInput& mirror = design.mirror;
  const bool plain = !std::isnan(mirror.thickness) && !mirror.material.empty();
  if (plain) {
    const fem::Material m = material_of(mirror.material, mirror.thickness);
    poisson_ = m.E / (2 * m.G) - 1;
    membrane_ = m.E * mirror.thickness / (1 - poisson_ * poisson_);
    rigidity_ = membrane_ * mirror.thickness * mirror.thickness / 12;
    mass_ = m.density * mirror.thickness;
  }
  if (!std::isnan(mirror.mass)) mass_ = mirror.mass;
  if (!std::isnan(mirror.bending_stiffness)) rigidity_ = mirror.bending_stiffness;
  known_ = rigidity_ > 0;
  if (!known_) {
    method_ = "The mirror's own sag is not computed: give its thickness and material, or bending-stiffness.";
    return;
  }
  const Skin& skin = row.collector().skin;
  const double width = row.collector().width, f = row.collector().focal_length;
  const int patterns = basis_count, hats = row.columns().hats;
  pressure_.resize(skin.rows, patterns + hats);
  for (int r = 0; r < skin.rows; ++r) {
    const double y = skin.row_y[static_cast<std::size_t>(r)];
    row_ds_.push_back(skin.row_weight[static_cast<std::size_t>(r)] * area_normal(y, f).norm());
    normal_.push_back(area_normal(y, f).normalized());
    for (int b = 0; b < patterns; ++b) pressure_(r, b) = basis_value(static_cast<Pattern>(b), y, width);
    for (int i = 0; i < hats; ++i) pressure_(r, patterns + i) = hat_value(row.hat_stations(), i, y / width);
  }
  const bool on_purlins = mirror.fixed_to == "purlins" && design.purlins.count > 0;
  on_purlins ? span_across(design) : span_along(design);
}

std::vector<SpanEnds> PanelModel::bay_ends(bool runs_on) const {
  const int bays = row_.collector().skin.bays();
  std::vector<SpanEnds> ends;
  for (int b = 0; b < bays; ++b) ends.push_back({runs_on && b > 0, runs_on && b + 1 < bays});
  return ends;
}

// Notes which kind the next bay is; false when that kind is still to be made and put last.
bool PanelModel::known_kind(SpanEnds ends) {
  const auto like = std::find_if(kinds_.begin(), kinds_.end(), [&](const Bay& b) {
    return b.ends.from_held == ends.from_held && b.ends.to_held == ends.to_held;
  });
  kind_of_bay_.push_back(static_cast<int>(like - kinds_.begin()));
  return like != kinds_.end();
}

void PanelModel::span_across(const TroughDesign& design) {
  const TroughLayout at = lay_out(design);
  const Skin& skin = row_.collector().skin;
  const double f = at.focal_length, bay = skin.bay;
  const fem::Section section = section_of(design.purlins.profile);
  const fem::Material material =
      material_of(design.purlins.profile.material, profile_thickness(design.purlins.profile));
  StripInput strip;
  strip.rigidity = rigidity_;
  for (double y : skin.row_y) strip.row_s.push_back(arc_at(y, f));
  strip.row_ds = row_ds_;
  std::vector<double> half = {at.arm_y[0]};
  for (int k : at.purlin_at) half.push_back(at.arm_y[static_cast<std::size_t>(k)]);
  for (auto y = half.rbegin(); y != half.rend(); ++y) support_y_.push_back(-*y);
  support_y_.insert(support_y_.end(), half.begin(), half.end());
  for (double y : support_y_) strip.support_s.push_back(arc_at(y, f));
  for (double y : facet_edges(design, at.width)) strip.edge_s.push_back(arc_at(y, f));
  for (double y : cuts(at, 1)) strip.node_s.push_back(arc_at(y, f));
  const StripAnswer answer = solve_strip(strip);

  const Eigen::Index rows = skin.rows, supports = static_cast<Eigen::Index>(support_y_.size());
  const Eigen::Index inner = supports / 2 - 1;  // the shoulders do not sag
  MatrixXd settled = answer.settled_deflection, settled_turn = answer.settled_slope;
  for (Eigen::Index k : {inner, inner + 1}) {
    settled.col(k).setZero();
    settled_turn.col(k).setZero();
  }
  for (Eigen::Index k = 0; k < supports; ++k)
    support_mass_.push_back(k == inner || k == inner + 1 ? 0 : material.density * section.A);
  MatrixXd push = MatrixXd::Zero(supports, 2 * rows + supports);
  push.leftCols(rows) = answer.reaction;
  push.rightCols(supports).setIdentity();
  // Bending along the mirror's normal; a rolled section bends in both its planes.
  const double roll = profile_roll(design.purlins.profile);
  const double soft = std::pow(bay, 4) / material.E *
                      (std::pow(std::cos(roll), 2) / section.Iy + std::pow(std::sin(roll), 2) / section.Iz);
  Bay made;
  made.normal = made.turn = MatrixXd::Zero(rows, 2 * rows + supports);
  made.normal.leftCols(rows) = answer.deflection;
  made.turn.leftCols(rows) = answer.slope;
  made.lined_normal = soft * settled * push;
  made.lined_turn = soft * settled_turn * push;
  made.lined_tangential = MatrixXd::Zero(rows, 2 * rows + supports);
  for (const SpanEnds& ends : bay_ends(true)) {
    made.ends = ends;
    if (!known_kind(ends)) kinds_.push_back(made);
  }
  method_ =
      "Mirror on its purlins: a strip across the trough over " + std::to_string(design.purlins.count) +
      " purlins and the tube's two shoulders, free to slide on them (plate strip, E t3 / 12 (1 - nu2)); "
      "the purlins sag from rib to rib as beams that run on inside the module.";
}

void PanelModel::span_along(const TroughDesign& design) {
  const TroughLayout at = lay_out(design);
  const Skin& skin = row_.collector().skin;
  const bool facets = design.mirror.kind == "facets";
  const std::vector<double> edges = facet_edges(design, at.width), all = cuts(at, 2);
  const Eigen::Index rows = skin.rows;
  for (const SpanEnds& ends : bay_ends(!facets)) {
    if (known_kind(ends)) continue;
    Bay made;
    made.ends = ends;
    made.normal = made.turn = MatrixXd::Zero(rows, 2 * rows);
    made.lined_normal = made.lined_tangential = made.lined_turn = MatrixXd::Zero(rows, 2 * rows);
    for (std::size_t p = 0; p + 1 < edges.size(); ++p) {
      ShellInput in{{at.width, at.focal_length}, rigidity_, membrane_, poisson_, skin.bay, ends, {}, {}, {}};
      in.node_y.push_back(edges[p]);
      for (double y : all)
        if (y > edges[p] + 1e-6 && y < edges[p + 1] - 1e-6) in.node_y.push_back(y);
      in.node_y.push_back(edges[p + 1]);
      std::vector<int> here;
      for (int r = 0; r < skin.rows; ++r) {
        const double y = skin.row_y[static_cast<std::size_t>(r)];
        if (y < edges[p] || y >= edges[p + 1]) continue;
        here.push_back(r);
        in.row_y.push_back(y);
        in.row_ds.push_back(row_ds_[static_cast<std::size_t>(r)]);
      }
      const ShellAnswer answer = solve_shell(in);
      std::vector<int> columns = here;
      for (int r : here) columns.push_back(r + skin.rows);
      made.lined_normal(here, columns) = answer.normal;
      made.lined_tangential(here, columns) = answer.tangential;
      made.lined_turn(here, columns) = answer.slope;
    }
    kinds_.push_back(std::move(made));
  }
  method_ = std::string(facets ? "Facets" : "Mirror sheet") +
            " on the ribs: held along every rib, free at the rims" +
            (membrane_ > 0
                 ? ", spanning between ribs as a thin curved sheet (Ritz, cubic elements across)"
                 : ", spanning between ribs as a flat strip (its membrane is not known: an upper bound)") +
            (facets ? "; every facet ends at its ribs." : "; the sheet runs on inside the module.");
}

// Net pressure pushes against the normal; weight along both axes of the surface.
MatrixXd PanelModel::inputs(const MatrixXd& amplitudes, int module) const {
  const Columns& at = row_.columns();
  const Skin& skin = row_.collector().skin;
  const auto supports = static_cast<Eigen::Index>(support_y_.size());
  const Eigen::Index rows = skin.rows;
  MatrixXd in = MatrixXd::Zero(2 * rows + supports, amplitudes.cols());
  in.topRows(rows) = -pressure_.leftCols(basis_count) *
                     amplitudes.middleRows(at.basis(module, static_cast<Pattern>(0)), basis_count);
  if (at.hats > 0)
    in.topRows(rows) -= pressure_.rightCols(at.hats) * amplitudes.middleRows(at.hat(0), at.hats);
  const auto pull_y = amplitudes.row(Columns::gravity_y), pull_z = amplitudes.row(Columns::gravity_z);
  for (Eigen::Index r = 0; r < rows; ++r) {
    const fem::Vec3& n = normal_[static_cast<std::size_t>(r)];
    in.row(r) += mass_ * (n.y() * pull_y + n.z() * pull_z);
    in.row(rows + r) += mass_ * (n.z() * pull_y - n.y() * pull_z);
  }
  for (Eigen::Index k = 0; k < supports; ++k) {
    const fem::Vec3 n =
        area_normal(support_y_[static_cast<std::size_t>(k)], row_.collector().focal_length).normalized();
    in.row(2 * rows + k) = support_mass_[static_cast<std::size_t>(k)] * (n.y() * pull_y + n.z() * pull_z);
  }
  return in;
}

PanelMotion PanelModel::motion(const MatrixXd& amplitudes) const {
  const Skin& skin = row_.collector().skin;
  const MatrixXd zero = MatrixXd::Zero(skin.samples(), amplitudes.cols());
  PanelMotion m{zero, zero, zero, zero};
  if (!known_) return m;
  const Eigen::Index rows = skin.rows;
  Eigen::VectorXd ny(rows), nz(rows);
  for (Eigen::Index r = 0; r < rows; ++r) {
    ny[r] = normal_[static_cast<std::size_t>(r)].y();
    nz[r] = normal_[static_cast<std::size_t>(r)].z();
  }
  for (int module = 0; module < skin.modules; ++module) {
    const MatrixXd in = inputs(amplitudes, module);
    for (std::size_t k = 0; k < kinds_.size(); ++k) {
      const Bay& bay = kinds_[k];
      const MatrixXd normal = bay.normal * in, turn = bay.turn * in, lined = bay.lined_normal * in;
      const MatrixXd tangential = bay.lined_tangential * in, lined_turn = bay.lined_turn * in;
      for (int st = 0; st < skin.stations; ++st) {
        if (kind_of_bay_[static_cast<std::size_t>(st / skin.stations_per_bay)] != static_cast<int>(k))
          continue;
        const double g = skin.bay_share[static_cast<std::size_t>(st % skin.stations_per_bay)];
        const double line = span_line(bay.ends, g), rise = span_line(bay.ends, g, 1) / skin.bay;
        const MatrixXd out = normal + line * lined, slide = line * tangential;
        const Eigen::Index first = (module * skin.stations + st) * rows;
        m.v.middleRows(first, rows) = ny.asDiagonal() * out + nz.asDiagonal() * slide;
        m.w.middleRows(first, rows) = nz.asDiagonal() * out - ny.asDiagonal() * slide;
        m.turn.middleRows(first, rows) = turn + line * lined_turn;
        m.along.middleRows(first, rows) = -rise * lined;
      }
    }
  }
  return m;
}

}  // namespace focalframe::models
