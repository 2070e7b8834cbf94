#pragma once

#include <cstdint>
#include <filesystem>
#include <string>
#include <vector>

#include "io/results.hpp"
#include "mesh/point.hpp"

class vtkDataSet;
class vtkFieldData;
class vtkPolyData;
class vtkUnstructuredGrid;

namespace barwall::io {

void add_scalars(vtkFieldData* to, const std::string& name, const std::vector<double>& values);
/// Three components, the third zero.
void add_vectors(vtkFieldData* to, const std::string& name, const std::vector<mesh::Point>& values);
/// Int32.
void add_integers(vtkFieldData* to, const std::string& name,
                  const std::vector<std::int32_t>& values);
void add_texts(vtkFieldData* to, const std::string& name, const std::vector<std::string>& values);

/// "B_T" with steady currents; "B_in_phase_T" and "B_quadrature_T" for patterns 0 and 1 with a
/// frequency.
std::string quantity_name(const std::string& quantity, const std::string& unit, int pattern,
                          bool alternating);

/// B at points [T].
struct FluxDensityArrays {
  std::vector<std::vector<mesh::Point>> b;  ///< per load pattern, per point
  std::vector<double> rms;                  ///< per point; with a frequency
  std::vector<double> peak;
};

/// B of every load pattern, and with a frequency B_rms_T and B_peak_T.
void add_flux_density(vtkFieldData* to, const FluxDensityArrays& arrays);

/// Names of the parts by the number that stands for them in `part` arrays: air, then file order.
std::vector<std::string> part_names(const Results& results);

/// Field data of every file: title, version, case_hash, verdict, validity, limits, part_names and
/// with a frequency frequency_hz.
void add_labels(vtkDataSet* to, const Results& results);

/// \throws WriteError
void write(vtkUnstructuredGrid* data, const std::filesystem::path& file);
/// \throws WriteError
void write(vtkPolyData* data, const std::filesystem::path& file);

}  // namespace barwall::io
