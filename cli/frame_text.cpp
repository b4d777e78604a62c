#include "cli/frame_text.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>

#include "cli/messages.h"
#include "cli/quantity.h"
#include "fem/shape_parts.h"

namespace focalframe::cli {
namespace {

constexpr std::size_t shown_reactions = 12;
constexpr std::size_t columns = 80;

std::string padded(std::string text, std::size_t width) {
  if (text.size() > width) text = text.substr(0, width - 1) + "~";
  return text + std::string(width - text.size(), ' ');
}

std::string number(double value, int width, const char* format = "%*.5g") {
  std::array<char, 64> buffer{};
  // Round-off below any meaning is shown as 0, so that tables can be read.
  std::snprintf(buffer.data(), buffer.size(), format, width, value == 0 ? 0.0 : value);
  return buffer.data();
}

std::string title(const std::string& name, const std::string& hash, const FrameFile& file,
                  const FrameResults& results) {
  const std::size_t cases = file.cases.size();
  std::string left = name + ": frame of " + std::to_string(file.frame.nodes.size()) + " nodes, " +
                     std::to_string(file.frame.members.size()) + " members, " + std::to_string(cases) +
                     (cases == 1 ? " case" : " cases") +
                     (results.mass > 0 ? ", " + quantity_text(results.mass, Quantity::mass) : "");
  const std::string right = "input " + hash.substr(0, 8);
  if (left.size() + right.size() + 2 > columns) return wrapped(left, 0) + right + "\n";
  return left + std::string(columns - left.size() - right.size(), ' ') + right + "\n";
}

struct Largest {
  double value = 0;
  int node = -1, dof = 0;
};

Largest largest(const Eigen::MatrixXd& u, int from) {
  Largest result;
  for (Eigen::Index n = 0; n < u.rows(); ++n)
    for (int d = from; d < from + 3; ++d)
      if (std::abs(u(n, d)) > std::abs(result.value)) result = {u(n, d), static_cast<int>(n), d};
  return result;
}

std::string displacement_lines(const FrameFile& file, const FrameCase& one) {
  const char* words[] = {"ux", "uy", "uz", "rx", "ry", "rz"};
  std::string result;
  const Largest shift = largest(one.response.displacement, 0), turn = largest(one.response.displacement, 3);
  if (shift.node < 0 && turn.node < 0) return "  nothing moves\n";
  const auto line = [&](const Largest& l, const char* what, Quantity quantity) {
    if (l.node < 0) return std::string();
    return "  " + padded(what, 22) + padded(quantity_text(l.value, quantity), 14) + words[l.dof] +
           " of node " + file.frame.nodes[static_cast<std::size_t>(l.node)].name + "\n";
  };
  return line(shift, "largest displacement", Quantity::length) +
         line(turn, "largest rotation", Quantity::angle);
}

std::vector<int> held_nodes(const FrameFile& file) {
  std::vector<int> nodes;
  for (const fem::Support& s : file.frame.supports) nodes.push_back(s.node);
  for (const fem::Spring& s : file.frame.springs)
    if (s.other < 0) nodes.push_back(s.node);
  std::sort(nodes.begin(), nodes.end());
  nodes.erase(std::unique(nodes.begin(), nodes.end()), nodes.end());
  return nodes;
}

std::string reaction_lines(const FrameFile& file, const FrameCase& one, bool all) {
  std::vector<int> nodes = held_nodes(file);
  const std::size_t count = nodes.size();
  const double greatest = one.response.reaction.cwiseAbs().maxCoeff();
  if (!all && count > shown_reactions) {
    std::stable_sort(nodes.begin(), nodes.end(), [&](int a, int b) {
      return one.response.reaction.row(a).head(3).norm() > one.response.reaction.row(b).head(3).norm();
    });
    nodes.resize(shown_reactions);
    std::sort(nodes.begin(), nodes.end());
  }
  std::string result = "  reaction at           fx N      fy N      fz N    mx N m    my N m    mz N m\n";
  const auto row = [&](const std::string& name, const Eigen::VectorXd& r) {
    result += "  " + padded(name, 16);
    for (int d = 0; d < 6; ++d) result += number(std::abs(r[d]) < 1e-9 * greatest ? 0.0 : r[d], 10);
    result += "\n";
  };
  for (const int n : nodes)
    row(file.frame.nodes[static_cast<std::size_t>(n)].name, one.response.reaction.row(n).transpose());
  if (nodes.size() < count)
    result += "  the largest of " + std::to_string(count) + "; all of them: --verbose or --json FILE\n";
  const Eigen::VectorXd sum = one.response.reaction.colwise().sum().transpose();
  result += "  " + padded("sum", 16);
  for (int d = 0; d < 3; ++d) result += number(std::abs(sum[d]) < 1e-9 * greatest ? 0.0 : sum[d], 10);
  return result + "\n";
}

// Moments and deflections between the nodes, where they are greatest over all members.
std::string extreme_lines(const FrameFile& file, const FrameCase& one) {
  struct Worst {
    fem::Extreme extreme{0, 0};
    std::size_t member = 0;
    const char* axis = "";
  } moment, bow;
  const auto look = [](Worst& worst, const fem::Extreme& e, std::size_t member, const char* axis) {
    if (std::abs(e.value) > std::abs(worst.extreme.value) * (1 + 1e-9)) worst = {e, member, axis};
  };
  for (std::size_t m = 0; m < one.extremes.size(); ++m) {
    const fem::Extremes& e = one.extremes[m];
    for (const fem::Extreme& my : {e.most_My, e.least_My}) look(moment, my, m, "about y");
    for (const fem::Extreme& mz : {e.most_Mz, e.least_Mz}) look(moment, mz, m, "about z");
    for (const fem::Extreme& y : {e.most_y, e.least_y}) look(bow, y, m, "along y");
    for (const fem::Extreme& z : {e.most_z, e.least_z}) look(bow, z, m, "along z");
  }
  const auto line = [&](const char* what, const Worst& worst, Quantity quantity) {
    if (worst.extreme.value == 0) return std::string();
    return "  " + padded(what, 22) + padded(quantity_text(worst.extreme.value, quantity), 14) + worst.axis +
           " of member " + file.frame.members[worst.member].name + " at " +
           number(worst.extreme.at, 0, "%*.2f") + " along it\n";
  };
  return line("extreme moment", moment, Quantity::torque) +
         line("bows from its chord", bow, Quantity::length);
}

std::string stress_line(const FrameFile& file, const FrameCase& one) {
  int worst = -1, most_used = -1;
  double used = 0;
  for (std::size_t m = 0; m < one.stresses.size(); ++m) {
    if (std::isnan(one.stresses[m].stress)) continue;
    if (worst < 0 || one.stresses[m].stress > one.stresses[static_cast<std::size_t>(worst)].stress)
      worst = static_cast<int>(m);
    const double yield = file.frame.materials[static_cast<std::size_t>(file.frame.members[m].material)].yield;
    if (yield > 0 && one.stresses[m].stress / yield >= used) {
      used = one.stresses[m].stress / yield;
      most_used = static_cast<int>(m);
    }
  }
  if (worst < 0) return "";
  const auto place = [&](int m) {
    return "member " + file.frame.members[static_cast<std::size_t>(m)].name + " at " +
           number(one.stresses[static_cast<std::size_t>(m)].at, 0, "%*.2f") + " along it";
  };
  std::string result =
      "  " + padded("extreme stress", 22) +
      padded(quantity_text(one.stresses[static_cast<std::size_t>(worst)].stress, Quantity::pressure), 14) +
      place(worst) + "\n";
  if (most_used >= 0)
    result += "  " + padded("share of yield", 22) +
              padded(number_text(std::round(used * 1000) / 10) + " %", 14) + place(most_used) +
              (used > 1 ? ", YIELDS" : "") + "\n";
  return result;
}

std::string second_order_line(const FrameCase& one) {
  const FrameSecondOrder& bent = one.second_order;
  if (!bent.asked) return "";
  if (!bent.stable)
    return "  " + padded("second order", 22) + "NOT STABLE: no equilibrium in the bent shape\n";
  std::string result = "  " + padded("second order", 22) + "largest displacement " +
                       quantity_text(bent.second, Quantity::length) + " instead of " +
                       quantity_text(bent.first, Quantity::length);
  if (bent.first > 0) result += " (" + number(100 * (bent.second / bent.first - 1), 0, "%+*.3g") + " %)";
  result += "\n";
  if (!std::isnan(bent.stress))
    result += "  " + padded("", 22) + "extreme stress " + quantity_text(bent.stress, Quantity::pressure) +
              (bent.used > 0 ? ", " + number_text(std::round(bent.used * 1000) / 10) + " % of yield" : "") +
              (bent.used > 1 ? ", YIELDS" : "") + "\n";
  return result;
}

std::string buckling_line(const FrameCase& one) {
  const std::vector<fem::BucklingMode>& modes = one.buckling.modes;
  if (modes.empty()) return "";
  std::string result = "  " + padded("buckling at", 22);
  for (std::size_t i = 0; i < std::min<std::size_t>(5, modes.size()); ++i)
    result += (i > 0 ? ", " : "") + number_text(modes[i].factor);
  return result + " times these loads" + (modes.front().factor < 1 ? ": IT BUCKLES" : "") + "\n" +
         second_order_line(one);
}

// Percentages below any meaning are not dressed up with digits.
std::string per_cent(double ratio) {
  return ratio < 1e-5 ? "less than 0.001 %" : number(100 * ratio, 0, "%*.2g") + " %";
}

// How a list of modes or factors is known to be right: pieces, residuals, count.
template <class Mode>
std::string proof_of(const std::vector<Mode>& modes, int pieces, double error, const char* what,
                     const char* unit) {
  if (modes.empty()) return "";
  double residual = 0;
  for (const Mode& mode : modes) residual = std::max(residual, mode.residual);
  const Mode& one = modes.front();
  return wrapped("  proof: members divided into up to " + std::to_string(pieces) +
                     " pieces inside (finer ones would lower the last value by about " + per_cent(error) +
                     "); greatest residual " + number(residual, 0, "%*.1e") + "; a count of pivots finds " +
                     std::to_string(one.counted) + " " + what + " below " + number_text(one.count_at) + unit +
                     ", none is missing",
                 2);
}

std::string shape_line(const fem::Frame& frame, const Eigen::MatrixXd& shape) {
  return wrapped("         " + fem::shape_words(frame, fem::shape_parts(frame, shape),
                                                {"along x", "along y", "along z"}),
                 9);
}

std::string remarks(const FrameResults& results) {
  std::string result;
  for (const std::string& remark : results.remarks) result += wrapped("Note: " + remark + ".", 0);
  return result;
}

constexpr const char* caution =
    "Linear elastic members and joints; nothing is judged against a standard.\n"
    "A licensed engineer signs.\n";

}  // namespace

std::string frame_text(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results, bool all) {
  std::string text = title(name, hash, file, results);
  for (const FrameCase& one : results.cases) {
    text += "Case " + one.name + "\n" + displacement_lines(file, one) + reaction_lines(file, one, all) +
            extreme_lines(file, one) + stress_line(file, one) + buckling_line(one);
    text += "  " + padded("proof", 22) + "residual " + number(one.response.residual, 0, "%*.1e") +
            ", balance of loads and reactions " + number(one.balance, 0, "%*.1e") + "\n";
  }
  const std::vector<fem::Mode>& modes = results.modes.modes;
  if (!modes.empty()) {
    text += "Frequencies             ";
    for (std::size_t i = 0; i < std::min<std::size_t>(6, modes.size()); ++i)
      text += (i > 0 ? ", " : "") + number_text(modes[i].frequency);
    text += " Hz\n                        (shapes: focalframe modes)\n";
  }
  text += "Condition estimate " + number(results.condition_estimate, 0, "%*.1e") + ", smallest pivot " +
          number(results.smallest_pivot_ratio, 0, "%*.1e") + " (below 1e-7: a mechanism)\n";
  return text + remarks(results) + caution;
}

std::string modes_text(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results) {
  std::string text = title(name, hash, file, results);
  const std::vector<fem::Mode>& modes = results.modes.modes;
  if (!modes.empty())
    text += "  mode   frequency Hz   period s   effective mass, % of all, along x    y    z\n";
  for (std::size_t i = 0; i < modes.size(); ++i) {
    const fem::Mode& mode = modes[i];
    text += number(static_cast<double>(i + 1), 6, "%*.0f") + number(mode.frequency, 15) +
            number(1 / mode.frequency, 11, "%*.4g") + std::string(33, ' ');
    for (int d = 0; d < 3; ++d)
      text += number(results.mass > 0 ? 100 * mode.effective_mass[d] / results.mass : 0, 5, "%*.0f");
    text += "\n" + shape_line(results.modes.divided.frame, mode.shape);
  }
  text += proof_of(modes, results.modes.most_pieces, results.modes.error, "frequencies", " Hz");
  for (const FrameCase& one : results.cases) {
    if (file.cases.empty()) break;
    text += "Case " + one.name + "\n";
    if (one.buckling.modes.empty()) text += "  does not buckle below 1e6 times these loads\n";
    for (const fem::BucklingMode& mode : one.buckling.modes)
      text += "  buckling at " + number_text(mode.factor) + " times these loads" +
              (mode.factor < 1 ? ": IT BUCKLES" : "") + "\n" +
              shape_line(one.buckling.divided.frame, mode.shape);
    text += second_order_line(one) +
            proof_of(one.buckling.modes, one.buckling.most_pieces, one.buckling.error, "factors", "");
  }
  return text + remarks(results);
}

}  // namespace focalframe::cli
