#include "cli/frame_text.h"

#include <algorithm>
#include <array>
#include <cmath>
#include <cstdio>

#include "cli/messages.h"
#include "cli/quantity.h"

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
           number(one.stresses[static_cast<std::size_t>(m)].at, 0, "%*.2f") + " of its length";
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

std::string buckling_line(const FrameCase& one) {
  if (one.buckling.empty()) return "";
  std::string result = "  buckling at           ";
  for (std::size_t i = 0; i < std::min<std::size_t>(5, one.buckling.size()); ++i)
    result += (i > 0 ? ", " : "") + number_text(one.buckling[i].factor);
  return result + " times these loads" + (one.buckling.front().factor < 1 ? ": IT BUCKLES" : "") + "\n";
}

std::string remarks(const FrameResults& results) {
  std::string result;
  for (const std::string& remark : results.remarks) result += wrapped("Note: " + remark + ".", 0);
  return result;
}

constexpr const char* caution =
    "Linear elastic members and rigid joints; nothing is judged against a standard.\n"
    "Buckling and higher frequencies take every member as one piece and come out too\n"
    "high where it bows between its nodes: divide it (4 pieces bring it to 0.1 %).\n"
    "A licensed engineer signs.\n";

}  // namespace

std::string frame_text(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results, bool all) {
  std::string text = title(name, hash, file, results);
  for (const FrameCase& one : results.cases) {
    text += "Case " + one.name + "\n" + displacement_lines(file, one) + reaction_lines(file, one, all) +
            stress_line(file, one) + buckling_line(one);
    text += "  " + padded("proof", 22) + "residual " + number(one.response.residual, 0, "%*.1e") +
            ", balance of loads and reactions " + number(one.balance, 0, "%*.1e") + "\n";
  }
  if (!results.modes.empty()) {
    text += "Frequencies             ";
    for (std::size_t i = 0; i < std::min<std::size_t>(6, results.modes.size()); ++i)
      text += (i > 0 ? ", " : "") + number_text(results.modes[i].frequency);
    text += " Hz\n";
  }
  return text + remarks(results) + caution;
}

std::string modes_text(const std::string& name, const std::string& hash, const FrameFile& file,
                       const FrameResults& results) {
  std::string text = title(name, hash, file, results);
  if (!results.modes.empty())
    text += "  mode   frequency Hz   period s   effective mass, % of all, along x    y    z\n";
  for (std::size_t i = 0; i < results.modes.size(); ++i) {
    const fem::Mode& mode = results.modes[i];
    text += number(static_cast<double>(i + 1), 6, "%*.0f") + number(mode.frequency, 15) +
            number(1 / mode.frequency, 11, "%*.4g") + std::string(33, ' ');
    for (int d = 0; d < 3; ++d) text += number(100 * mode.effective_mass[d] / results.mass, 5, "%*.0f");
    text += "\n";
  }
  for (const FrameCase& one : results.cases) {
    if (file.cases.empty()) break;
    text += "Case " + one.name + "\n" +
            (one.buckling.empty() ? std::string("  does not buckle below 1e6 times these loads\n")
                                  : buckling_line(one));
  }
  return text + remarks(results);
}

}  // namespace focalframe::cli
