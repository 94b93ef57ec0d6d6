// SPDX-License-Identifier: MIT
#include "layout/export/plain_number.hpp"

#include "layout/sheet/export_error.hpp"

#include <catch2/catch.hpp>

#include <limits>

using namespace dialwright::layout;

TEST_CASE("Numbers are plain", "[layout]") {
    const auto written = [](double value, int decimals, int least) {
        std::string text;
        add_number(text, value, decimals, least);
        return text;
    };
    CHECK(written(1.5, 4, 0) == "1.5");
    CHECK(written(100, 4, 0) == "100");
    CHECK(written(100, 4, 1) == "100.0");
    CHECK(written(100, 0, 0) == "100");
    CHECK(written(-0.00004, 4, 0) == "0");
    CHECK(written(-0.00004, 4, 1) == "0.0");
    CHECK(written(-0.00006, 4, 1) == "-0.0001");
    CHECK(written(-360.123456789, 9, 0) == "-360.123456789");
    CHECK(written(1e-9, 10, 1) == "0.000000001");
    CHECK(written(9999999, 4, 1) == "9999999.0");
    CHECK_THROWS_AS(written(1e8, 4, 1), ExportError);
    CHECK_THROWS_AS(written(std::numeric_limits<double>::infinity(), 4, 1), ExportError);
    CHECK(in_capitals("cut-3_é") == "CUT-3_é");
}
