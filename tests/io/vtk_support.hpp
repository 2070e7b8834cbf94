#pragma once

#include <filesystem>
#include <map>
#include <string>
#include <vector>

#include "io/results.hpp"

namespace barwall::test {

/// A new empty folder, removed at the end.
struct NewFolder {
  NewFolder();
  ~NewFolder();
  NewFolder(const NewFolder&) = delete;
  NewFolder& operator=(const NewFolder&) = delete;

  std::filesystem::path path;
};

/// An array of a VTK file: `components` numbers for each point or cell.
struct FileArray {
  int components = 1;
  std::string type;  ///< such as "double" or "int"
  std::vector<double> values;

  double at(std::size_t item, int component = 0) const {
    return values.at(item * static_cast<std::size_t>(components) +
                     static_cast<std::size_t>(component));
  }
  mesh::Point point(std::size_t item) const { return {at(item, 0), at(item, 1)}; }
};

/// The arrays of a file's points, cells or field data, by name.
struct FileArrays {
  std::map<std::string, FileArray> numbers;
  std::map<std::string, std::vector<std::string>> texts;
};

/// A .vtu or .vtp file as its reader understands it.
struct VtkFile {
  FileArray points;
  std::vector<std::vector<int>> cells;  ///< point numbers of each
  FileArrays point_data;
  FileArrays cell_data;
  FileArrays field_data;

  std::vector<std::string> names_of_point_arrays() const;
  std::vector<std::string> names_of_cell_arrays() const;
};

VtkFile read_vtk(const std::filesystem::path& file);

/// "same" when an array holds exactly these numbers, to 1e-12 of the largest of them, else where
/// it differs.
std::string compared(const FileArray& found, int components, const std::vector<double>& expected);

/// The same for vectors, which have a third component of zero.
std::string compared(const FileArray& found, const std::vector<mesh::Point>& expected);

/// Results of a case of steady currents, and of one at 50 Hz, both with steel; made once.
const io::Results& steady_results();
const io::Results& alternating_results();

/// The folder that write_vtk wrote these results into, once.
const std::filesystem::path& folder_of(const io::Results& results);

}  // namespace barwall::test
