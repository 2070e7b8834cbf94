#pragma once

#include <filesystem>
#include <optional>
#include <string>
#include <utility>
#include <vector>

#include "mesh/section.hpp"
#include "solver/excitation.hpp"
#include "solver/fault_current.hpp"
#include "solver/material.hpp"

namespace barwall::io {

/// Where the field is asked for. Exactly one of the three ways of giving the place.
struct ProbeRequest {
  enum class Kind { point, line, around };

  std::string name;
  Kind kind = Kind::point;
  mesh::Point at;                 ///< point [m]
  mesh::Point from, to;           ///< line [m]
  double clearance = 0.0;         ///< around: distance from the outermost outline [m]
  int points = 0;                 ///< line and around: number of points
  std::optional<double> limit_t;  ///< limit on |B| [T]; r.m.s. with a frequency
  std::string limit_from;         ///< the limit's own source
};

/// A short circuit. Its currents are its own: they owe nothing to the case's.
struct FaultRequest {
  solver::FaultCurrent current;  ///< its bars as parts of the section
  std::string given_key;         ///< what said how it decays or rises: "r_over_x", "peak_ka", ...
  double given_value = 0.0;      ///< its value, in the file's own unit
  /// [A] where kappa, peak_over_rms or peak_ka was given. With a frequency the waveform's own
  /// crest (solver::crest_of) differs from it a little.
  std::optional<double> given_peak;
};

/// What holds the bars in a short circuit.
struct SupportRequest {
  double span = 0.0;               ///< from support to support [m]
  std::optional<double> strength;  ///< of one support [N]
  std::string strength_from;       ///< the strength's own source
};

/// Grid settings of a case.
struct GridRequest {
  int cells_across = 4;
  double reach = 400.0;
  bool cells_across_given = false;
};

/// A case file, read and found valid; SI units throughout, names resolved to part indices.
struct Case {
  std::string file;    ///< the case file as it was given
  std::string name;    ///< the file's name without extension
  std::string title;   ///< the name where the file gives no title
  std::string sha256;  ///< of the bytes of the case file and its curve files, and of every --set
  std::string grid_place;  ///< FILE:LINE:COLUMN of [grid], for messages about the grid
  std::optional<double> run_length_m;
  /// Names of [given] with their values after --set, in file order, in the file's own units.
  std::vector<std::pair<std::string, double>> given;

  mesh::Section section;
  std::vector<solver::Material> materials;  ///< one per part of the section
  solver::Excitation excitation;            ///< one current per part
  std::vector<solver::Circuit> circuits;    ///< one per [[three_phase]]
  std::vector<ProbeRequest> probes;         ///< the two default lines where the file has none
  std::vector<solver::Loop> loops;          ///< every pair of up to 10 bars where the file has none
  std::optional<FaultRequest> fault;
  std::optional<SupportRequest> supports;  ///< only with a fault
  GridRequest grid;
};

/// Replaces the value of one name of [given]: --set NAME=VALUE (VALUE may be an expression).
struct Setting {
  std::string name;
  std::string value;
};

/// Reads and checks a case file.
/// \throws InputError (io/input_error.hpp) for everything wrong with it.
Case read_case(const std::filesystem::path& file, const std::vector<Setting>& settings = {});

}  // namespace barwall::io
