#include "io/vtk_arrays.hpp"

#include <vtkCommand.h>
#include <vtkDataSet.h>
#include <vtkDoubleArray.h>
#include <vtkErrorCode.h>
#include <vtkExecutive.h>
#include <vtkFieldData.h>
#include <vtkNew.h>
#include <vtkPolyData.h>
#include <vtkStringArray.h>
#include <vtkTypeInt32Array.h>
#include <vtkUnstructuredGrid.h>
#include <vtkXMLPolyDataWriter.h>
#include <vtkXMLUnstructuredGridWriter.h>

#include <cmath>

#include "io/version.hpp"
#include "io/write_error.hpp"
#include "solver/cycle.hpp"

namespace barwall::io {
namespace {

/// Keeps what a writer complains of, which would otherwise go to the terminal.
class Complaints : public vtkCommand {
public:
  static Complaints* New() { return new Complaints; }

  void Execute(vtkObject* /*caller*/, unsigned long /*event*/, void* text) override {
    if (text != nullptr && first.empty()) first = static_cast<const char*>(text);
  }

  std::string first;
};

void write_with(vtkXMLWriter* writer, vtkDataObject* data, const std::filesystem::path& file) {
  vtkNew<Complaints> complaints;
  writer->AddObserver(vtkCommand::ErrorEvent, complaints);
  writer->GetExecutive()->AddObserver(vtkCommand::ErrorEvent, complaints);
  writer->SetFileName(file.c_str());
  writer->SetInputDataObject(data);
  // Base64 throughout, so that the file is valid XML.
  writer->SetDataModeToAppended();
  writer->SetEncodeAppendedData(true);
  writer->SetCompressorTypeToZLib();
  writer->SetCompressionLevel(1);
  writer->SetHeaderTypeToUInt64();
  const bool written = writer->Write() == 1;
  if (written && writer->GetErrorCode() == vtkErrorCode::NoError && complaints->first.empty()) {
    return;
  }
  std::string why;
  if (writer->GetErrorCode() != vtkErrorCode::NoError) {
    why = vtkErrorCode::GetStringFromErrorCode(writer->GetErrorCode());
  }
  if (why.empty()) why = complaints->first;
  throw WriteError("cannot write " + file.string() + (why.empty() ? "" : ": " + why));
}

}  // namespace

void add_scalars(vtkFieldData* to, const std::string& name, const std::vector<double>& values) {
  vtkNew<vtkDoubleArray> array;
  array->SetName(name.c_str());
  array->SetNumberOfTuples(static_cast<vtkIdType>(values.size()));
  for (std::size_t k = 0; k < values.size(); ++k) {
    array->SetValue(static_cast<vtkIdType>(k), values[k]);
  }
  to->AddArray(array);
}

void add_vectors(vtkFieldData* to, const std::string& name,
                 const std::vector<mesh::Point>& values) {
  vtkNew<vtkDoubleArray> array;
  array->SetName(name.c_str());
  array->SetNumberOfComponents(3);
  array->SetNumberOfTuples(static_cast<vtkIdType>(values.size()));
  for (std::size_t k = 0; k < values.size(); ++k) {
    array->SetTuple3(static_cast<vtkIdType>(k), values[k].x, values[k].y, 0.0);
  }
  to->AddArray(array);
}

void add_integers(vtkFieldData* to, const std::string& name,
                  const std::vector<std::int32_t>& values) {
  vtkNew<vtkTypeInt32Array> array;
  array->SetName(name.c_str());
  array->SetNumberOfTuples(static_cast<vtkIdType>(values.size()));
  for (std::size_t k = 0; k < values.size(); ++k) {
    array->SetValue(static_cast<vtkIdType>(k), values[k]);
  }
  to->AddArray(array);
}

void add_texts(vtkFieldData* to, const std::string& name, const std::vector<std::string>& values) {
  vtkNew<vtkStringArray> array;
  array->SetName(name.c_str());
  array->SetNumberOfTuples(static_cast<vtkIdType>(values.size()));
  for (std::size_t k = 0; k < values.size(); ++k) {
    array->SetValue(static_cast<vtkIdType>(k), values[k]);
  }
  to->AddArray(array);
}

std::string quantity_name(const std::string& quantity, const std::string& unit, int pattern,
                          bool alternating) {
  if (!alternating) return quantity + "_" + unit;
  return quantity + (pattern == 0 ? "_in_phase_" : "_quadrature_") + unit;
}

void add_flux_density(vtkFieldData* to, const FluxDensityArrays& arrays) {
  const bool alternating = arrays.b.size() > 1;
  for (std::size_t k = 0; k < arrays.b.size(); ++k) {
    add_vectors(to, quantity_name("B", "T", static_cast<int>(k), alternating), arrays.b[k]);
  }
  if (!alternating) return;
  add_scalars(to, "B_rms_T", arrays.rms);
  add_scalars(to, "B_peak_T", arrays.peak);
}

std::vector<std::string> part_names(const Results& results) {
  std::vector<std::string> names{"air"};
  for (const mesh::Part& part : results.problem->section.parts) names.push_back(part.name);
  return names;
}

void add_labels(vtkDataSet* to, const Results& results) {
  vtkFieldData* fields = to->GetFieldData();
  add_texts(fields, "title", {results.input.title});
  add_texts(fields, "version", {version()});
  add_texts(fields, "case_hash", {results.input.sha256});
  add_texts(fields, "verdict", {results.verdict()});
  add_texts(fields, "validity", {results.validity()});
  add_texts(fields, "limits", {results.limits()});
  add_texts(fields, "part_names", part_names(results));
  if (results.alternating()) {
    add_scalars(fields, "frequency_hz", {results.problem->excitation.frequency_hz});
  }
}

void write(vtkUnstructuredGrid* data, const std::filesystem::path& file) {
  vtkNew<vtkXMLUnstructuredGridWriter> writer;
  write_with(writer, data, file);
}

void write(vtkPolyData* data, const std::filesystem::path& file) {
  vtkNew<vtkXMLPolyDataWriter> writer;
  write_with(writer, data, file);
}

}  // namespace barwall::io
