#include "fem/divided.h"

#include <algorithm>
#include <cmath>

#include "fem/text.h"

namespace focalframe::fem {
namespace {

/// Fractions of the length where the pieces of member number `member` meet.
std::vector<double> places_of(int member, int count) {
  std::vector<double> places{0};
  const double golden = 0.6180339887498949 * (member + 1);
  const double shift = 0.01 * (golden - std::floor(golden) - 0.5);
  for (int i = 1; i < count; ++i) places.push_back((i + shift) / count);
  places.push_back(1);
  return places;
}

/// One member in pieces; new nodes and pieces go to the end of `out`.
void divide_member(const Frame& whole, int index, int count, Divided& out) {
  const Member& member = whole.members[static_cast<std::size_t>(index)];
  const Vec3 start = whole.nodes[static_cast<std::size_t>(member.from)].at + member.offset_from,
             end = whole.nodes[static_cast<std::size_t>(member.to)].at + member.offset_to;
  const std::vector<double> places = places_of(index, count);
  std::vector<int> pieces;
  Member piece = member;
  for (int i = 0; i < count; ++i) {
    const bool last = i + 1 == count;
    piece.to = member.to;
    piece.offset_to = member.offset_to;
    piece.release_to = member.release_to;
    piece.spring_to = member.spring_to;
    if (!last) {
      const double xi = places[static_cast<std::size_t>(i) + 1];
      piece.to = static_cast<int>(out.frame.nodes.size());
      piece.offset_to = Vec3::Zero();
      piece.release_to = {};
      piece.spring_to = {};
      const int near = xi < 0.5 ? member.from : member.to;
      out.frame.nodes.push_back(
          {start + xi * (end - start), member.name + " at " + number(std::round(100 * xi) / 100) + " (near " +
                                           whole.nodes[static_cast<std::size_t>(near)].name + ")"});
    }
    pieces.push_back(static_cast<int>(out.frame.members.size()));
    out.frame.members.push_back(piece);
    piece.from = piece.to;
    piece.offset_from = Vec3::Zero();
    piece.release_from = {};
    piece.spring_from = {};
  }
  out.pieces.push_back(pieces);
  out.places.push_back(places);
}

/// Piece that holds the fraction, with the fraction of the piece's own length.
std::pair<std::size_t, double> piece_at(const std::vector<double>& places, double at) {
  std::size_t k = 0;
  while (k + 2 < places.size() && at > places[k + 1]) ++k;
  return {k, std::clamp((at - places[k]) / (places[k + 1] - places[k]), 0.0, 1.0)};
}

void divide_line(const Divided& divided, const LineLoad& line, LoadCase& out) {
  const auto m = static_cast<std::size_t>(line.member);
  const std::vector<double>& places = divided.places.at(m);
  for (std::size_t k = 0; k + 1 < places.size(); ++k) {
    const double a = std::max(line.from, places[k]), b = std::min(line.to, places[k + 1]),
                 width = places[k + 1] - places[k];
    if (!(b - a > 1e-12)) continue;
    const auto value = [&](double xi) -> Vec3 {
      return line.at_from + (xi - line.from) / (line.to - line.from) * (line.at_to - line.at_from);
    };
    LineLoad part = line;
    part.member = divided.pieces[m][k];
    part.from = std::clamp((a - places[k]) / width, 0.0, 1.0);
    part.to = std::clamp((b - places[k]) / width, 0.0, 1.0);
    part.at_from = value(a);
    part.at_to = value(b);
    out.lines.push_back(part);
  }
}

}  // namespace

Divided divide(const Frame& frame, const std::vector<int>& count) {
  require(count.size() == frame.members.size(), "divide needs one count for each member");
  Divided out;
  out.frame = frame;
  out.frame.members.clear();
  for (int m = 0; m < static_cast<int>(count.size()); ++m) {
    require(count[static_cast<std::size_t>(m)] >= 1, "a member is divided into at least one piece");
    divide_member(frame, m, count[static_cast<std::size_t>(m)], out);
  }
  return out;
}

LoadCase divide(const Divided& divided, const LoadCase& load) {
  LoadCase out;
  out.name = load.name;
  out.gravity = load.gravity;
  out.nodes = load.nodes;
  for (const LineLoad& line : load.lines) divide_line(divided, line, out);
  for (MemberPointLoad point : load.points) {
    const auto m = static_cast<std::size_t>(point.member);
    const auto [piece, at] = piece_at(divided.places.at(m), point.at);
    point.member = divided.pieces[m][piece];
    point.at = at;
    out.points.push_back(point);
  }
  for (MemberTemperature t : load.temperatures) {
    const std::vector<int>& pieces = divided.pieces.at(static_cast<std::size_t>(t.member));
    for (const int piece : pieces) {
      t.member = piece;
      out.temperatures.push_back(t);
    }
  }
  return out;
}

}  // namespace focalframe::fem
