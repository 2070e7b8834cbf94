#pragma once

#include <array>
#include <complex>
#include <functional>
#include <limits>
#include <optional>
#include <string>
#include <vector>

#include "solver/readings.hpp"

namespace barwall::solver {

inline constexpr double not_given = std::numeric_limits<double>::quiet_NaN();

/// One number of the results. NaN stands for "not given" in `value` and `plus_minus`.
struct Figure {
  std::string key;  ///< last part of its address, such as "force_x"
  double value = not_given;
  std::string unit;               ///< SI
  double plus_minus = not_given;  ///< numerical uncertainty, 95 %
  double hand = not_given;        ///< what a handbook's formula gives in its place
};

/// A named group of figures: a bar, a piece, a wall, a body, a loop, a circuit.
struct Entry {
  std::string name;                ///< a body's and a circuit's: its parts' names joined by "+"
  std::vector<std::string> parts;  ///< bodies and circuits: the parts' names
  std::vector<Figure> figures;
  std::vector<Entry> pieces;           ///< of a bar with several
  std::complex<double> current = 0.0;  ///< of a bar [A]; r.m.s. phasor with a frequency
  std::string hand_formula = {};       ///< name of the formula of its figures' hand values
  std::string hand_source = {};        ///< where that is published
  std::vector<Entry> faces = {};       ///< of a wall (wall_face_rule), named by their sides
};

enum class LimitState { none, met, exceeded, undecided };

struct ProbePoint {
  mesh::Point at;
  std::vector<Figure> figures;
};

struct ProbeFigures {
  Probe probe;
  std::vector<ProbePoint> points;  ///< as many as the probe has
  std::vector<Figure> figures;  ///< of a line: the largest values, of_limit; of a point: of_limit
  mesh::Point largest_at;       ///< of a line: where |B| (r.m.s. with a frequency) is largest
  LimitState limit_state = LimitState::none;
};

struct Clearance {
  std::array<std::string, 2> between;
  Figure gap;
};

/// Something the user should know of that is no failure of the numbers.
struct Notice {
  std::string name;
  std::string detail;
  bool indicative = false;  ///< the model fits the thing only roughly because of this
};

/// The largest forces of a short circuit, whose currents are its own.
struct FaultFigures {
  std::vector<Figure> circuit;  ///< the fault's ratios in all their guises, its crest
  std::vector<Entry> bars;      ///< with pieces
  std::vector<Entry> walls;
  std::vector<Entry> bodies;
};

/// All numbers of a solution, in the order of the case file.
struct Figures {
  std::vector<Entry> bars;
  std::vector<Entry> walls;
  std::vector<Entry> bodies;  ///< of several parts in contact
  std::vector<Entry> loops;
  std::vector<Entry> circuits;
  std::vector<Figure> energy;
  std::vector<ProbeFigures> probes;
  std::vector<Clearance> clearances;
  std::optional<FaultFigures> fault;
  std::vector<Notice> notices;
};

/// A figure by key, or nullptr.
const Figure* find_figure(const std::vector<Figure>& figures, const std::string& key);

/// Every figure with its address, in order: "bars/L2/force_x", "bars/N/pieces/N.1/force_x",
/// "loops/L1-L2/inductance", "energy", "probes/sensor/b", "clearances/L1-L2/gap".
std::vector<std::pair<std::string, const Figure*>> addresses(const Figures& figures);

/// The figures of a force over the cycle, or of a steady one.
std::vector<Figure> force_figures(const PulsatingVector& force, bool alternating);

/// The same figures without their values.
std::vector<Figure> without_values(std::vector<Figure> figures);

/// A push on a face, with the keys of its figure and of that of the mean pressure.
struct FacePush {
  std::string push_key;
  std::string pressure_key;
  double push = 0.0;  ///< [N/m]
};

/// Entries of a wall's faces: pushes [N/m], then mean pressures [Pa]. They are named by their
/// sides, "top", in a wall of several pieces with the piece's number, "2 top". \param pushes_on the
/// pushes on the k-th of all faces
std::vector<Entry> face_entries(
    const Problem& problem, const WallFaces& faces, int part,
    const std::function<std::vector<FacePush>(std::size_t k)>& pushes_on);

/// Names joined by "+", as a body's and a circuit's.
std::string joined(const std::vector<std::string>& names);

/// The worst of the probes' limit states: exceeded, undecided, met, none.
LimitState limits_of(const Figures& figures);

/// The figures of a problem from what was read off its solution.
Figures figures_of(const Problem& problem, const ForceGeometry& geometry, const Readings& readings,
                   const std::vector<Probe>& probes, const std::vector<Circuit>& circuits);

}  // namespace barwall::solver
