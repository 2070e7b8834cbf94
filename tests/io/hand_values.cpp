// The hand values of a fault in figures.json and figures.csv.

#include <catch2/catch.hpp>
#include <map>
#include <nlohmann/json.hpp>
#include <sstream>

#include "io/results_csv.hpp"
#include "io/results_json.hpp"
#include "tests/io/case_support.hpp"

using namespace barwall;
using Json = nlohmann::json;

namespace {

/// Bars of two and of three flat pieces in open air.
const std::string bars_in_pieces = R"(frequency_hz = 50
[[bar]]
name = "L1"
current_a = 100
rectangle_mm = { centres = [[-10, 0], [10, 0]], size = [10, 60] }
[[bar]]
name = "N"
current_a = "balance"
rectangle_mm = { centres = [[180, 0], [200, 0], [220, 0]], size = [10, 60] }
[grid]
cells_across = 2
reach = 5
[fault]
between = ["L1", "N"]
symmetrical_ka = 20
r_over_x = 0.1
)";

}  // namespace

TEST_CASE("Hand values of outer pieces in a fault stand in figures.json and figures.csv") {
  const io::Results results = io::run_case(test::read_text(bars_in_pieces));
  const Json json = Json::parse(io::figures_json(results));
  std::map<std::string, Json> by_address;
  for (const Json& hand : json["hand"]) by_address[hand["address"]] = hand;
  for (const char* outer : {"L1/pieces/L1.1", "L1/pieces/L1.2", "N/pieces/N.1", "N/pieces/N.3"}) {
    std::string address = "fault/bars/";
    address.append(outer).append("/force_peak");
    INFO(address);
    REQUIRE(by_address.count(address) == 1);
    const Json& hand = by_address[address];
    CHECK(hand["source"] == "IEC 60865-1");
    CHECK(hand["formula"] == "F_s between the pieces");
    CHECK(hand["hand"]["unit"] == "N/m");
    // kappa is 1.02 + 0.98 exp(-0.3); effective distances of IEC 60865-1, table 1 (from memory).
    const bool two = outer[0] == 'L';
    const double share = 1.746 * std::sqrt(2.0) * 20e3 / (two ? 2.0 : 3.0);
    const double value = hand["hand"]["value"].get<double>();
    CHECK(value == Approx(2e-7 * share * share / (two ? 0.034 : 0.020)).epsilon(0.03));
    // The ratio is that of the figure at the same address.
    const std::size_t bar = two ? 0 : 1;
    for (const Json& piece : json["fault"]["bars"][bar]["pieces"]) {
      if (address.find(piece["name"].get<std::string>()) == std::string::npos) continue;
      CHECK(hand["ratio"].get<double>() ==
            Approx(piece["force_peak"]["value"].get<double>() / value).epsilon(1e-9));
    }
  }
  CHECK(by_address.count("fault/bars/N/pieces/N.2/force_peak") == 0);
  CHECK(by_address.count("fault/bars/L1/pieces/L1.1/force_x_max") == 0);

  std::istringstream rows(io::figures_csv(results));
  int seen = 0;
  for (std::string row; std::getline(rows, row);) {
    const std::string address = row.substr(0, row.find(','));
    if (address.rfind("fault/", 0) != 0 || address.find("/pieces/") == std::string::npos) continue;
    std::vector<std::string> fields;
    std::istringstream columns(row);
    for (std::string field; std::getline(columns, field, ',');) fields.push_back(field);
    REQUIRE(fields.size() >= 4);
    const bool given = fields.size() > 4 && !fields[4].empty();
    INFO(row);
    CHECK(given == (by_address.count(address) == 1));
    if (!given) continue;
    ++seen;
    CHECK(std::stod(fields[4]) == by_address[address]["hand"]["value"].get<double>());
  }
  CHECK(seen == 4);
}
