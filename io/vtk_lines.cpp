#include <vtkCellArray.h>
#include <vtkCellData.h>
#include <vtkFieldData.h>
#include <vtkNew.h>
#include <vtkPoints.h>
#include <vtkPolyData.h>

#include <numbers>
#include <variant>

#include "io/flux_lines.hpp"
#include "io/vtk_arrays.hpp"
#include "io/vtk_files.hpp"

namespace barwall::io {
namespace {

using mesh::Point;

/// Polylines being collected.
class Lines {
public:
  Lines() { points_->SetDataTypeToDouble(); }

  /// Adds a polyline; a closed one ends at its own first point.
  void add(const std::vector<Point>& line, bool closed) {
    const vtkIdType first = points_->GetNumberOfPoints();
    lines_->InsertNextCell(static_cast<int>(line.size()) + (closed ? 1 : 0));
    for (const Point p : line) {
      lines_->InsertCellPoint(points_->InsertNextPoint(p.x, p.y, 0.0));
    }
    if (closed) lines_->InsertCellPoint(first);
  }

  void give_to(vtkPolyData* data) const {
    data->SetPoints(points_);
    data->SetLines(lines_);
  }

private:
  vtkNew<vtkPoints> points_;
  vtkNew<vtkCellArray> lines_;
};

double sagitta_of(const mesh::Curve& curve) {
  const auto* arc = std::get_if<mesh::Arc>(&curve);
  return arc == nullptr ? 1.0 : 4e-5 * arc->radius;
}

/// The part that an outline bounds: of two the one painted later, bars after walls.
int bounded_part(const mesh::Section& section, int left, int right) {
  const auto rank = [&](int part) {
    if (part < 0) return -1;
    const bool bar = section.parts[static_cast<std::size_t>(part)].kind == mesh::Part::Kind::bar;
    return part + (bar ? static_cast<int>(section.parts.size()) : 0);
  };
  return rank(left) >= rank(right) ? left : right;
}

}  // namespace

void write_outlines(const Results& results, const std::filesystem::path& folder) {
  const std::vector<std::string> names = part_names(results);
  const auto name_of = [&](int part) { return names[static_cast<std::size_t>(part + 1)]; };
  Lines lines;
  std::vector<std::int32_t> left;
  std::vector<std::int32_t> right;
  std::vector<std::string> left_name;
  std::vector<std::string> right_name;
  std::vector<std::string> name;
  for (const mesh::OutlinePiece& piece : results.problem->outline.pieces) {
    lines.add(polyline(piece.curve, sagitta_of(piece.curve)), false);
    left.push_back(piece.left.part + 1);
    right.push_back(piece.right.part + 1);
    left_name.push_back(name_of(piece.left.part));
    right_name.push_back(name_of(piece.right.part));
    name.push_back(
        name_of(bounded_part(results.problem->section, piece.left.part, piece.right.part)));
  }
  vtkNew<vtkPolyData> data;
  lines.give_to(data);
  vtkFieldData* cells = data->GetCellData();
  add_texts(cells, "name", name);
  add_integers(cells, "part_left", left);
  add_integers(cells, "part_right", right);
  add_texts(cells, "part_left_name", left_name);
  add_texts(cells, "part_right_name", right_name);
  add_labels(data, results);
  write(data, folder / "outlines.vtp");
}

void write_flux_lines(const Results& results, const std::filesystem::path& folder) {
  constexpr int levels = 40;
  Lines lines;
  std::vector<double> potential;
  for (const FluxLine& line : flux_lines(results, section_surroundings(results), levels)) {
    lines.add(line.points, line.closed);
    potential.push_back(line.potential);
  }
  vtkNew<vtkPolyData> data;
  lines.give_to(data);
  add_scalars(data->GetCellData(), "A_Wb_per_m", potential);
  add_labels(data, results);
  if (results.alternating()) {
    add_scalars(data->GetFieldData(), "instant_deg",
                {flux_line_instant(results) * 180.0 / std::numbers::pi});
  }
  write(data, folder / "flux_lines.vtp");
}

}  // namespace barwall::io
