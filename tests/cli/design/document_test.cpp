// SPDX-License-Identifier: MIT
#include "cli/design/document.hpp"

#include <catch2/catch.hpp>
#include <fmt/format.h>

#include <filesystem>
#include <fstream>
#include <sstream>

using namespace dialwright::cli;

TEST_CASE("a tree with places", "[cli]") {
    const DocumentReading reading = read_document("# a note\ntitle: Garden dial\nplate:\n  corners: [[0 mm, 1 mm], 2]\n"
                                                  "hours:\n",
                                                  "x.yaml");
    REQUIRE(reading.errors.empty());
    REQUIRE(reading.root);
    REQUIRE(reading.root->entries.size() == 3);
    const Entry* title = reading.root->find("title");
    REQUIRE(title != nullptr);
    CHECK(title->at == Position{2, 1});
    CHECK(title->value.at == Position{2, 8});
    CHECK(title->value.text == "Garden dial");
    const Entry* corners = reading.root->find("plate")->value.find("corners");
    REQUIRE(corners != nullptr);
    CHECK(corners->at == Position{4, 3});
    REQUIRE(corners->value.items.size() == 2);
    CHECK(corners->value.items[0].items[1].text == "1 mm");
    CHECK(corners->value.items[0].items[1].at == Position{4, 20});
    const Entry* hours = reading.root->find("hours");
    CHECK(hours->value.kind == Node::Kind::empty);
    CHECK(hours->value.at == Position{5, 1}); // its key's, not the next line's
    CHECK(reading.root->find("dates") == nullptr);
}

TEST_CASE("scalars stay text", "[cli]") {
    const DocumentReading reading =
        read_document("a: 010\nb: .inf\nc: yes\nd: 1.50\ne: '~'\nf: 0x10\ng: \"1\\t2\"\n", "x.yaml");
    REQUIRE(reading.root);
    CHECK(reading.root->find("a")->value.text == "010");
    CHECK(reading.root->find("b")->value.text == ".inf");
    CHECK(reading.root->find("c")->value.text == "yes");
    CHECK(reading.root->find("d")->value.text == "1.50");
    CHECK(reading.root->find("e")->value.text == "~");
    CHECK(reading.root->find("f")->value.text == "0x10");
    CHECK(reading.root->find("g")->value.text == "1\t2");
}

TEST_CASE("columns count characters, and every line end counts once", "[cli]") {
    for (const char* end : {"\n", "\r\n", "\r"}) {
        const std::string text = fmt::format("\uFEFFa: 1{0}{{ä: Ὥρα, b: [x}}{0}", end);
        const DocumentReading reading = read_document(text, "x.yaml");
        REQUIRE(reading.errors.size() == 1);
        CHECK(reading.errors[0].line == 2);
    }
    const DocumentReading reading = read_document("t: {ä: \"Ὥρα\", b: x}\r\nu: v\r\n", "x.yaml");
    REQUIRE(reading.root);
    CHECK(reading.root->find("t")->value.find("b")->at == Position{1, 15});
    CHECK(reading.root->find("u")->at == Position{2, 1});
}

TEST_CASE("quotes that hold what looks like their end", "[cli]") {
    const DocumentReading reading =
        read_document("a: 'it''s'\nb: \"say \\\"hour\\\"\"\nc: \"\\\\\"\nd: ''\n", "x.yaml");
    REQUIRE(reading.errors.empty());
    CHECK(reading.root->find("a")->value.text == "it's");
    CHECK(reading.root->find("b")->value.text == "say \"hour\"");
    CHECK(reading.root->find("c")->value.text == "\\");
    CHECK(reading.root->find("d")->value.text.empty());
    CHECK(read_document("a: 'it''s\n", "x.yaml").errors.size() == 1);
    CHECK(read_document("a: \"it\\\"", "x.yaml").errors.size() == 1);
}

TEST_CASE("files that are too large are refused without being walked", "[cli]") {
    CHECK(read_document(std::string(k_largest_file_bytes + 1, 'a'), "x.yaml").errors.size() == 1);
    std::string many;
    for (std::size_t i = 0; i < k_most_nodes + 10; ++i)
        many += "- a\n";
    const DocumentReading reading = read_document(many, "x.yaml");
    CHECK_FALSE(reading.root);
    REQUIRE(reading.errors.size() == 1);
    CHECK(reading.errors[0].message.find("more than") != std::string::npos);
    CHECK_FALSE(read_document(std::string(900'000, '['), "x.yaml").root);
    CHECK_FALSE(read_document(std::string(900'000, '{'), "x.yaml").root);
    std::string keys;
    for (int i = 0; i < 15000; ++i)
        keys += fmt::format("k{}: a\n", i);
    CHECK(read_document(keys, "x.yaml").root);
}

TEST_CASE("yaml-cpp is included in one source only", "[cli]") {
    namespace fs = std::filesystem;
    for (const char* folder : {"engine", "layout", "cli"})
        for (const auto& entry : fs::recursive_directory_iterator{fs::path{DIALWRIGHT_SOURCE_DIR} / folder}) {
            const std::string extension = entry.path().extension().string();
            if (entry.path().filename() == "document.cpp" || (extension != ".cpp" && extension != ".hpp"))
                continue;
            std::ifstream stream{entry.path()};
            std::stringstream text;
            text << stream.rdbuf();
            INFO(entry.path().string());
            CHECK(text.str().find("yaml-cpp/") == std::string::npos);
        }
}
