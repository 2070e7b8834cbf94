#include "io/case_requests.hpp"

#include <fmt/format.h>

#include <cstddef>
#include <set>
#include <string>
#include <utility>

namespace barwall::io {

namespace {

constexpr int most_points = 100000;            // of one probe
constexpr int most_points_together = 1000000;  // of all probes
constexpr std::size_t most_requests = 10000;   // probes, and loops
constexpr std::size_t most_paired_bars = 10;
constexpr int points_around = 181;

constexpr Allowed distance_mm{0.0, farthest_mm, false, " mm"};
constexpr Allowed limit_ut{0.0, 1e12, false, " uT"};

ProbeRequest line_around(const std::string& name, double clearance_mm) {
  ProbeRequest probe;
  probe.name = name;
  probe.kind = ProbeRequest::Kind::around;
  probe.clearance = metres(clearance_mm);
  probe.points = points_around;
  return probe;
}

std::string unique_name(const CaseTable& table, std::set<std::string>& taken,
                        std::string_view among) {
  const TomlValue& value = table.require("name");
  std::string name = read_name(table.text(), value, "name");
  if (!taken.insert(name).second) {
    table.text().fail(value.place, fmt::format("the name \"{}\" is taken; names are unique among "
                                               "{}",
                                               name, among));
  }
  return name;
}

/// Refuses keys that belong to another kind of probe.
void refuse(const CaseTable& table, const std::vector<std::string>& keys, const char* place) {
  for (const std::string& key : keys) {
    if (const TomlEntry* entry = table.find(key)) {
      table.text().fail(entry->place,
                        fmt::format("{} does not go with {} in a [[probe]]", key, place));
    }
  }
}

void read_place(const CaseTable& table, ProbeRequest& probe) {
  const CaseText& text = table.text();
  const auto points = [&] {
    return read_whole_number(text, table.require("points"), "points", 2, most_points);
  };
  if (const TomlEntry* at = table.find("at_mm")) {
    refuse(table, {"from_mm", "to_mm", "points", "distance_mm"}, "at_mm");
    probe.kind = ProbeRequest::Kind::point;
    probe.at = read_point(text, at->value, "at_mm");
    probe.points = 1;
  } else if (const TomlEntry* distance = table.find("distance_mm")) {
    refuse(table, {"from_mm", "to_mm"}, "distance_mm");
    const double clearance = read_number(text, distance->value, "distance_mm", distance_mm);
    const int given = table.find("points") == nullptr ? points_around : points();
    probe = line_around(probe.name, clearance);
    probe.points = given;
  } else if (table.find("from_mm") != nullptr || table.find("to_mm") != nullptr) {
    probe.kind = ProbeRequest::Kind::line;
    probe.from = read_point(text, table.require("from_mm"), "from_mm");
    probe.to = read_point(text, table.require("to_mm"), "to_mm");
    probe.points = points();
    if (mesh::distance(probe.from, probe.to) < metres(smallest_mm)) {
      text.fail(table.require("to_mm").place,
                "to_mm is the same point as from_mm; a line needs a length, a point at_mm");
    }
  } else {
    text.fail(table.header(),
              "[[probe]] needs a place: at_mm, or from_mm, to_mm and points, or distance_mm");
  }
}

void read_limit(const CaseTable& table, ProbeRequest& probe) {
  const CaseText& text = table.text();
  const TomlEntry* limit = table.find("limit_ut");
  const TomlEntry* source = table.find("limit_from");
  if (limit != nullptr) {
    probe.limit_t = 1e-6 * read_number(text, limit->value, "limit_ut", limit_ut);
    if (source == nullptr) {
      text.fail(table.header(),
                "limit_ut without limit_from: give the limit's own source, which "
                "is printed beside it");
    }
    probe.limit_from = read_line(text, source->value, "limit_from");
  } else if (source != nullptr) {
    text.fail(source->place, "limit_from without limit_ut");
  }
}

/// Every pair of the bars; a name that comes out twice is told apart by a number.
std::vector<solver::Loop> all_pairs(const CaseParts& parts) {
  std::vector<int> bars;
  for (std::size_t k = 0; k < parts.section.parts.size(); ++k) {
    if (parts.is_bar(static_cast<int>(k))) bars.push_back(static_cast<int>(k));
  }
  std::vector<solver::Loop> loops;
  if (bars.size() > most_paired_bars) return loops;
  std::set<std::string> taken;
  for (std::size_t i = 0; i < bars.size(); ++i) {
    for (std::size_t j = i + 1; j < bars.size(); ++j) {
      const std::string pair = parts.section.parts[static_cast<std::size_t>(bars[i])].name + "-" +
                               parts.section.parts[static_cast<std::size_t>(bars[j])].name;
      std::string name = pair;
      for (int n = 2; !taken.insert(name).second; ++n) name = fmt::format("{} ({})", pair, n);
      loops.push_back({name, {bars[i]}, {bars[j]}});
    }
  }
  return loops;
}

}  // namespace

std::vector<ProbeRequest> read_probes(const CaseTable& root) {
  const CaseText& text = root.text();
  const auto tables = tables_of(root, "probe");
  if (tables.empty())
    return {line_around("200 mm around", 200.0), line_around("1000 mm around", 1000.0)};
  std::vector<ProbeRequest> probes;
  std::set<std::string> taken;
  int points = 0;
  for (const TomlValue* value : tables) {
    const CaseTable table(
        text, *value, "[[probe]]",
        {"name", "at_mm", "from_mm", "to_mm", "points", "distance_mm", "limit_ut", "limit_from"});
    ProbeRequest probe;
    probe.name = unique_name(table, taken, "probes");
    read_place(table, probe);
    read_limit(table, probe);
    points += probe.points;
    if (points > most_points_together || probes.size() == most_requests) {
      text.fail(table.header(), fmt::format("more than {} probes, or {} points of all probes",
                                            most_requests, most_points_together));
    }
    probes.push_back(std::move(probe));
  }
  return probes;
}

std::vector<solver::Loop> read_loops(const CaseTable& root, const CaseParts& parts) {
  const CaseText& text = root.text();
  const auto tables = tables_of(root, "loop");
  if (tables.empty()) return all_pairs(parts);
  if (tables.size() > most_requests) {
    text.fail(tables[most_requests]->place, fmt::format("more than {} loops", most_requests));
  }
  std::vector<solver::Loop> loops;
  std::set<std::string> taken;
  for (const TomlValue* value : tables) {
    const CaseTable table(text, *value, "[[loop]]", {"name", "go", "return"});
    solver::Loop loop;
    loop.name = unique_name(table, taken, "loops");
    loop.go = read_part_list(parts, text, table.require("go"), "go", mesh::Part::Kind::bar);
    const TomlValue& back = table.require("return");
    loop.back = read_part_list(parts, text, back, "return", mesh::Part::Kind::bar);
    const std::set<int> going(loop.go.begin(), loop.go.end());
    for (std::size_t k = 0; k < loop.back.size(); ++k) {
      if (going.count(loop.back[k]) == 0) continue;
      const TomlValue& name = std::get<TomlArray>(back.content)[k];
      text.fail(name.place, fmt::format("return: bar {} stands in go already", shown(name)));
    }
    loops.push_back(std::move(loop));
  }
  return loops;
}

GridRequest read_grid(const CaseTable& root) {
  GridRequest grid;
  const TomlEntry* entry = root.find("grid");
  if (entry == nullptr) return grid;
  const CaseText& text = root.text();
  const CaseTable table(text, entry->value, "[grid]", {"cells_across", "reach"});
  if (const TomlEntry* cells = table.find("cells_across")) {
    grid.cells_across = read_whole_number(text, cells->value, "cells_across", 2, 100000);
    grid.cells_across_given = true;
  }
  if (const TomlEntry* reach = table.find("reach")) {
    grid.reach = read_number(text, reach->value, "reach", {5.0, 1e6, true, ""});
  }
  return grid;
}

}  // namespace barwall::io
