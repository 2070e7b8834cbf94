#include "tests/io/vtk_support.hpp"

#include <vtkCellData.h>
#include <vtkDataArray.h>
#include <vtkFieldData.h>
#include <vtkIdList.h>
#include <vtkNew.h>
#include <vtkPointData.h>
#include <vtkPolyData.h>
#include <vtkStringArray.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLPolyDataReader.h>
#include <vtkXMLUnstructuredGridReader.h>

#include <unistd.h>

#include <cmath>
#include <stdexcept>

#include "io/vtk_export.hpp"
#include "tests/io/case_support.hpp"

namespace barwall::test {
namespace {

FileArrays arrays_of(vtkFieldData* data) {
  FileArrays result;
  for (int k = 0; k < data->GetNumberOfArrays(); ++k) {
    vtkAbstractArray* array = data->GetAbstractArray(k);
    const std::string name = array->GetName();
    if (auto* texts = vtkStringArray::SafeDownCast(array)) {
      for (vtkIdType i = 0; i < texts->GetNumberOfValues(); ++i) {
        result.texts[name].push_back(texts->GetValue(i));
      }
      continue;
    }
    auto* numbers = vtkDataArray::SafeDownCast(array);
    FileArray& to = result.numbers[name];
    to.components = numbers->GetNumberOfComponents();
    to.type = numbers->GetDataTypeAsString();
    for (vtkIdType i = 0; i < numbers->GetNumberOfTuples(); ++i) {
      for (int c = 0; c < to.components; ++c) to.values.push_back(numbers->GetComponent(i, c));
    }
  }
  return result;
}

VtkFile contents_of(vtkDataSet* data) {
  VtkFile file;
  file.points.components = 3;
  for (vtkIdType i = 0; i < data->GetNumberOfPoints(); ++i) {
    double p[3];
    data->GetPoint(i, p);
    file.points.values.insert(file.points.values.end(), p, p + 3);
  }
  for (vtkIdType i = 0; i < data->GetNumberOfCells(); ++i) {
    vtkNew<vtkIdList> ids;
    data->GetCellPoints(i, ids);
    std::vector<int> cell;
    for (vtkIdType k = 0; k < ids->GetNumberOfIds(); ++k) {
      cell.push_back(static_cast<int>(ids->GetId(k)));
    }
    file.cells.push_back(std::move(cell));
  }
  file.point_data = arrays_of(data->GetPointData());
  file.cell_data = arrays_of(data->GetCellData());
  file.field_data = arrays_of(data->GetFieldData());
  return file;
}

template <class Reader>
VtkFile read_with(const std::filesystem::path& file) {
  vtkNew<Reader> reader;
  if (reader->CanReadFile(file.c_str()) == 0) throw std::runtime_error("no VTK file");
  reader->SetFileName(file.c_str());
  reader->Update();
  return contents_of(reader->GetOutput());
}

std::vector<std::string> names_of(const FileArrays& arrays) {
  std::vector<std::string> names;
  for (const auto& entry : arrays.numbers) names.push_back(entry.first);
  for (const auto& entry : arrays.texts) names.push_back(entry.first);
  return names;
}

const std::string walls_and_probes = R"(
[material.steel]
relative_permeability = 200
[[wall]]
name = "plate"
material = "steel"
rectangle_mm = { centre = [0, -40], size = [100, 6] }
[[wall]]
name = "foot"
material = "stainless"
rectangle_mm = { centre = [0, -46], size = [40, 6] }
[[probe]]
name = "sensor"
at_mm = [0, 30]
[[probe]]
name = "above"
from_mm = [-50, 60]
to_mm = [400, 60]
points = 7
[[probe]]
name = "around"
distance_mm = 5
points = 40
[grid]
cells_across = 3
reach = 10
)";

const std::string steady_case = R"(title = "Zwei Schienen & ein \"Blech\" <µ>"
[[bar]]
name = "A"
current_a = 1000
rectangle_mm = { centre = [-20, 0], size = [8, 40], turn_deg = 20 }
[[bar]]
name = "B"
current_a = -700
round_mm = { centre = [25, 0], diameter = 16 }
)" + walls_and_probes;

const std::string alternating_case = R"(title = "three bars over a plate"
frequency_hz = 50
[[bar]]
name = "L1"
rectangle_mm = { centre = [-25, 0], size = [8, 40] }
[[bar]]
name = "L2"
rectangle_mm = { centre = [0, 0], size = [8, 40] }
[[bar]]
name = "L3"
rectangle_mm = { centre = [25, 0], size = [8, 40] }
[[three_phase]]
bars = ["L1", "L2", "L3"]
current_a = 1000
)" + walls_and_probes;

}  // namespace

NewFolder::NewFolder() {
  static int count = 0;
  path = std::filesystem::temp_directory_path() /
         ("barwall-vtk-test-" + std::to_string(::getpid()) + "-" + std::to_string(++count));
  std::filesystem::create_directories(path);
}

NewFolder::~NewFolder() {
  std::error_code ignored;
  std::filesystem::remove_all(path, ignored);
}

std::vector<std::string> VtkFile::names_of_point_arrays() const {
  return names_of(point_data);
}
std::vector<std::string> VtkFile::names_of_cell_arrays() const {
  return names_of(cell_data);
}

VtkFile read_vtk(const std::filesystem::path& file) {
  return file.extension() == ".vtu" ? read_with<vtkXMLUnstructuredGridReader>(file)
                                    : read_with<vtkXMLPolyDataReader>(file);
}

std::string compared(const FileArray& found, int components, const std::vector<double>& expected) {
  if (found.components != components) return "another number of components";
  if (found.values.size() != expected.size()) return "another length";
  double scale = 0.0;
  for (const double value : expected) scale = std::max(scale, std::abs(value));
  for (std::size_t k = 0; k < expected.size(); ++k) {
    if (!(std::abs(found.values[k] - expected[k]) <= 1e-12 * scale)) {
      return "value " + std::to_string(k) + " is " + std::to_string(found.values[k]) + ", not " +
             std::to_string(expected[k]);
    }
  }
  return "same";
}

std::string compared(const FileArray& found, const std::vector<mesh::Point>& expected) {
  std::vector<double> values;
  for (const mesh::Point p : expected) values.insert(values.end(), {p.x, p.y, 0.0});
  return compared(found, 3, values);
}

const io::Results& steady_results() {
  static const io::Results results = io::run_case(read_text(steady_case));
  return results;
}

const io::Results& alternating_results() {
  static const io::Results results = io::run_case(read_text(alternating_case));
  return results;
}

const std::filesystem::path& folder_of(const io::Results& results) {
  static std::map<const io::Results*, NewFolder> folders;
  const auto known = folders.find(&results);
  if (known != folders.end()) return known->second.path;
  const std::filesystem::path& folder = folders[&results].path;
  write_vtk(results, folder);
  return folder;
}

}  // namespace barwall::test
