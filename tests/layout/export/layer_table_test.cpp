// SPDX-License-Identifier: MIT
#include "layout/export/layer_table.hpp"

#include "layout/sheet/export_error.hpp"

#include <catch2/catch.hpp>

#include <set>

using namespace dialwright::layout;

TEST_CASE("Each layer has a name and a colour of its own", "[layout]") {
    const LayerTable table = usual_layers();
    CHECK_NOTHROW(table.check());
    std::set<int> colours;
    for (const Layer layer : k_layers) {
        CHECK(table[layer].name == name_of(layer));
        colours.insert(table[layer].colour);
    }
    CHECK(colours.size() == std::size(k_layers));
}

TEST_CASE("A table that no machine could read is refused", "[layout]") {
    const auto with = [](LayerStyle style) {
        LayerTable table = usual_layers();
        table[Layer::cut] = std::move(style);
        return table;
    };
    CHECK_NOTHROW(with({"CUT-3_mm$", {}, 255}).check());
    CHECK_THROWS_AS(with({"", {}, 1}).check(), ExportError);
    CHECK_THROWS_AS(with({"cut through", {}, 1}).check(), ExportError);
    CHECK_THROWS_AS(with({std::string(32, 'x'), {}, 1}).check(), ExportError);
    CHECK_THROWS_WITH(with({"Engrave", {}, 1}).check(), Catch::Contains("\"cut\"") && Catch::Contains("\"engrave\""));
    CHECK_THROWS_AS(with({"cut", {}, 0}).check(), ExportError);
    CHECK_THROWS_AS(with({"cut", {}, 256}).check(), ExportError);
    CHECK_THROWS_AS(with({"cut", {0, 1.5, 0}, 1}).check(), ExportError);
}
