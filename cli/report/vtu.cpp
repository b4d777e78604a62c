#include "cli/report/vtu.h"

#include <map>

#include "cli/report_units.h"
#include "loads/pose.h"

namespace focalframe::cli {
namespace {

using fem::Vec3;
using models::Portrait;

constexpr int vtk_line = 3, vtk_quad = 9;  // cell types of the VTK file formats document

// Own axes of a part to world axes in one pose.
class Pose {
 public:
  Pose(const Portrait& p, double elevation)
      : turn_(loads::world_to_collector(elevation).transpose()),
        behind_(0, 0, p.axis_to_vertex),
        up_(0, 0, p.axis_height) {}
  Vec3 place(const Vec3& own, bool turns) const { return turns ? Vec3(turn_ * (own + behind_) + up_) : own; }
  Vec3 motion(const Vec3& own, bool turns) const { return turns ? Vec3(turn_ * own) : own; }

 private:
  Eigen::Matrix3d turn_;
  Vec3 behind_, up_;
};

std::string vectors(const char* name, const std::vector<Vec3>& values) {
  std::string out = std::string("<DataArray type=\"Float64\" Name=\"") + name +
                    "\" NumberOfComponents=\"3\" format=\"ascii\">\n";
  for (const Vec3& v : values) out += text_of("%.9g %.9g %.9g\n", v.x(), v.y(), v.z());
  return out + "</DataArray>\n";
}

std::string scalars(const char* name, const std::vector<double>& values) {
  std::string out = std::string("<DataArray type=\"Float64\" Name=\"") + name + "\" format=\"ascii\">\n";
  for (double v : values) out += text_of("%.9g\n", v);
  return out + "</DataArray>\n";
}

std::string grid(const std::vector<Vec3>& points, const std::vector<std::vector<int>>& cells, int type,
                 const std::string& point_data, const std::string& cell_data) {
  std::string connectivity, offsets, types;
  std::size_t end = 0;
  for (const auto& cell : cells) {
    for (int i : cell) connectivity += text_of("%d ", i);
    end += cell.size();
    connectivity += "\n";
    offsets += text_of("%zu\n", end);
    types += text_of("%d\n", type);
  }
  const auto array = [](const char* kind, const char* name, const std::string& text) {
    return std::string("<DataArray type=\"") + kind + "\" Name=\"" + name + "\" format=\"ascii\">\n" + text +
           "</DataArray>\n";
  };
  return "<?xml version=\"1.0\"?>\n<VTKFile type=\"UnstructuredGrid\" version=\"0.1\" "
         "byte_order=\"LittleEndian\">\n<UnstructuredGrid>\n" +
         text_of("<Piece NumberOfPoints=\"%zu\" NumberOfCells=\"%zu\">\n", points.size(), cells.size()) +
         "<PointData>\n" + point_data + "</PointData>\n<CellData>\n" + cell_data + "</CellData>\n<Points>\n" +
         vectors("place", points) + "</Points>\n<Cells>\n" + array("Int64", "connectivity", connectivity) +
         array("Int64", "offsets", offsets) + array("UInt8", "types", types) +
         "</Cells>\n</Piece>\n</UnstructuredGrid>\n</VTKFile>\n";
}

}  // namespace

std::string frame_vtu(const Portrait& p, std::size_t state) {
  const models::PortraitState& s = p.states[state];
  const Pose pose(p, s.state.elevation);
  std::vector<Vec3> points, moves;
  for (std::size_t i = 0; i < p.points.size(); ++i) {
    points.push_back(pose.place(p.points[i].at, p.points[i].turns));
    moves.push_back(pose.motion(s.moves[i], p.points[i].turns));
  }
  std::vector<std::vector<int>> cells;
  std::vector<double> axial, shear, torsion, bending, stress, group;
  std::map<std::string, double> groups;
  for (std::size_t m = 0; m < p.members.size(); ++m) {
    cells.push_back({p.members[m].from, p.members[m].to});
    const models::MemberForces& f = s.forces[m];
    axial.push_back(f.axial);
    shear.push_back(f.shear);
    torsion.push_back(f.torsion);
    bending.push_back(f.bending);
    stress.push_back(f.stress);
    group.push_back(groups.emplace(p.members[m].group, static_cast<double>(groups.size())).first->second);
  }
  return grid(points, cells, vtk_line, vectors("displacement", moves),
              scalars("axial", axial) + scalars("shear", shear) + scalars("torsion", torsion) +
                  scalars("bending", bending) + scalars("stress", stress) + scalars("group", group));
}

std::string mirror_vtu(const Portrait& p, std::size_t state) {
  const models::PortraitState& s = p.states[state];
  const Pose pose(p, s.state.elevation);
  std::vector<Vec3> points, moves;
  for (std::size_t i = 0; i < p.mirror.size(); ++i) {
    points.push_back(pose.place(p.mirror[i], true));
    moves.push_back(pose.motion(s.mirror[i], true));
  }
  std::vector<std::vector<int>> cells;
  for (int st = 0; st + 1 < p.stations; ++st) {
    const auto here = static_cast<std::size_t>(st);
    if (p.module_of_station[here] != p.module_of_station[here + 1]) continue;
    for (int r = 0; r + 1 < p.rows; ++r) {
      const int a = st * p.rows + r, b = a + p.rows;
      cells.push_back({a, b, b + 1, a + 1});
    }
  }
  return grid(points, cells, vtk_quad,
              vectors("displacement", moves) + scalars("turned_across", s.turned_across) +
                  scalars("turned_along", s.turned_along),
              "");
}

}  // namespace focalframe::cli
