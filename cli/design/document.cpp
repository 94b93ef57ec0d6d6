// SPDX-License-Identifier: MIT
#include "cli/design/document.hpp"

#include <yaml-cpp/yaml.h>

#include <yaml-cpp/eventhandler.h>

#include <algorithm>
#include <sstream>
#include <utility>

namespace dialwright::cli {

const Entry* Node::find(std::string_view key) const {
    const auto found = std::find_if(entries.begin(), entries.end(), [&](const Entry& e) { return e.key == key; });
    return found == entries.end() ? nullptr : &*found;
}

namespace {

/// Bytes of the UTF-8 character that starts at `text`[i]; 0 when there is none (a stray or missing byte, an overlong
/// form, a surrogate, or beyond U+10FFFF). Source: RFC 3629, section 4.
std::size_t utf8_length(std::string_view text, std::size_t i) {
    const auto byte = [&](std::size_t k) { return k < text.size() ? static_cast<unsigned char>(text[k]) : 0U; };
    const auto follows = [&](std::size_t k, unsigned low = 0x80, unsigned high = 0xBF) {
        return byte(k) >= low && byte(k) <= high;
    };
    const unsigned first = byte(i);
    if (first < 0x80)
        return 1;
    if (first >= 0xC2 && first <= 0xDF)
        return follows(i + 1) ? 2 : 0;
    if (first >= 0xE0 && first <= 0xEF) {
        const bool second = follows(i + 1, first == 0xE0 ? 0xA0 : 0x80, first == 0xED ? 0x9F : 0xBF);
        return second && follows(i + 2) ? 3 : 0;
    }
    if (first >= 0xF0 && first <= 0xF4) {
        const bool second = follows(i + 1, first == 0xF0 ? 0x90 : 0x80, first == 0xF4 ? 0x8F : 0xBF);
        return second && follows(i + 2) && follows(i + 3) ? 4 : 0;
    }
    return 0;
}

/// U+0000 to U+001F and U+007F to U+009F, but tab, line end and next line (U+0085).
bool is_control(std::string_view text, std::size_t i) {
    const auto byte = static_cast<unsigned char>(text[i]);
    if (byte == '\t' || byte == '\n')
        return false;
    if (byte == 0xC2 && i + 1 < text.size()) {
        const auto second = static_cast<unsigned char>(text[i + 1]);
        return second < 0xA0 && second != 0x85;
    }
    return byte < 0x20 || byte == 0x7F;
}

/// Without a byte order mark, and every line end a line feed, so that lines are counted as an editor counts them.
std::string plain_lines(std::string_view text) {
    if (text.starts_with("\xEF\xBB\xBF"))
        text.remove_prefix(3);
    std::string plain;
    plain.reserve(text.size());
    for (std::size_t i = 0; i < text.size(); ++i) {
        if (text[i] != '\r')
            plain += text[i];
        else if (i + 1 == text.size() || text[i + 1] != '\n')
            plain += '\n';
    }
    return plain;
}

std::optional<DesignError> bad_character(std::string_view text, const std::string& file) {
    Position at;
    for (std::size_t i = 0; i < text.size();) {
        const std::size_t length = utf8_length(text, i);
        if (length == 0)
            return DesignError{
                file, at.line, at.column, "", "this byte is not UTF-8 text", "save the file with the encoding UTF-8"};
        if (is_control(text, i))
            return DesignError{
                file, at.line, at.column, "", "there is a control character here", "save the file as plain UTF-8 text"};
        if (text[i] == '\n')
            at = {at.line + 1, 1};
        else
            ++at.column;
        i += length;
    }
    return std::nullopt;
}

/// Thrown by the builder where going on would only bring confusion; the error is recorded already.
struct Stop {};

/// Builds the tree from yaml-cpp's events.
class Builder : public YAML::EventHandler {
  public:
    Builder(std::string_view text, const std::string& file) : text_{text}, file_{file} {
        line_starts_.push_back(0);
        for (std::size_t i = 0; i < text.size(); ++i)
            if (text[i] == '\n')
                line_starts_.push_back(i + 1);
    }

    [[nodiscard]] DocumentReading take() { return {std::move(root_), std::move(errors_)}; }

    /// yaml-cpp counts lines and bytes from 0.
    [[nodiscard]] Position place_of(const YAML::Mark& mark) const {
        if (mark.line < 0)
            return {};
        const auto line = std::min(static_cast<std::size_t>(mark.line), line_starts_.size() - 1);
        const std::size_t start = line_starts_[line];
        const std::size_t end = std::min(start + static_cast<std::size_t>(std::max(mark.column, 0)), text_.size());
        const auto starts_character = [](char c) { return (static_cast<unsigned char>(c) & 0xC0U) != 0x80U; };
        const auto before = text_.substr(start, end - start);
        return {static_cast<int>(line) + 1,
                static_cast<int>(std::count_if(before.begin(), before.end(), starts_character)) + 1};
    }

    void error(Position at, std::string message, std::string hint) {
        errors_.push_back({file_, at.line, at.column, "", std::move(message), std::move(hint)});
    }

    void OnDocumentStart(const YAML::Mark& mark) override {
        if (started_) {
            error(place_of(mark), "a second document starts here", "give each design a file of its own");
            throw Stop{};
        }
        started_ = true;
    }
    void OnDocumentEnd() override {}
    void OnAnchor(const YAML::Mark& mark, const std::string& name) override {
        error(place_of(mark), "\"&" + name + "\" is a YAML anchor, which a design file does without",
              "write the value where it is needed; put quotes round a text that starts with &");
    }
    void OnAlias(const YAML::Mark& mark, YAML::anchor_t) override {
        error(place_of(mark), "this is a YAML alias, which a design file does without",
              "write the value here; put quotes round a text that starts with *");
        if (awaits_key())
            throw Stop{};
        place(Node{});
    }
    void OnNull(const YAML::Mark& mark, YAML::anchor_t) override {
        if (awaits_key()) {
            error(place_of(mark), "there is no key before the colon", "write the key, as in \"title: Garden dial\"");
            throw Stop{};
        }
        Node node;
        node.at = open_.empty() ? place_of(mark) : home_;
        place(std::move(node));
    }
    void OnScalar(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t, const std::string& value) override {
        const Position at = place_of(mark);
        refuse_tag(tag, at);
        if (awaits_key()) {
            open_key(at, value);
            return;
        }
        Node node;
        node.kind = Node::Kind::text;
        node.at = at;
        node.text = value;
        place(std::move(node));
    }
    void OnSequenceStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t,
                         YAML::EmitterStyle::value) override {
        start(Node::Kind::list, tag, place_of(mark));
    }
    void OnSequenceEnd() override { finish(); }
    void OnMapStart(const YAML::Mark& mark, const std::string& tag, YAML::anchor_t,
                    YAML::EmitterStyle::value) override {
        start(Node::Kind::mapping, tag, place_of(mark));
    }
    void OnMapEnd() override { finish(); }

  private:
    /// A list or mapping that is not closed yet, and in a mapping the key whose value comes next.
    struct Open {
        Node node;
        bool has_key = false;
        bool again = false; ///< the key was there before: its value is dropped
        std::string key;
        Position key_at;
    };

    [[nodiscard]] bool awaits_key() const {
        return !open_.empty() && open_.back().node.kind == Node::Kind::mapping && !open_.back().has_key;
    }

    void refuse_tag(const std::string& tag, Position at) {
        if (!tag.empty() && tag != "?" && tag != "!")
            error(at, "this value has a YAML tag (a word that starts with !), which a design file does without",
                  "leave the tag out; put quotes round a text that starts with !");
    }

    void open_key(Position at, const std::string& key) {
        Open& open = open_.back();
        const Entry* before = open.node.find(key);
        if (before != nullptr)
            errors_.push_back({file_, at.line, at.column, key,
                               "this key is given twice, first on line " + std::to_string(before->at.line),
                               "keep one of them"});
        open.again = before != nullptr;
        open.has_key = true;
        open.key = key;
        open.key_at = home_ = at;
    }

    void start(Node::Kind kind, const std::string& tag, Position at) {
        refuse_tag(tag, at);
        if (awaits_key()) {
            error(at, "a list or mapping stands where a key should be",
                  "a key is a plain text; put quotes round a text that starts with [ or {");
            throw Stop{};
        }
        if (open_.size() >= k_deepest_nesting) {
            error(at, "lists and mappings are nested deeper than " + std::to_string(k_deepest_nesting) + " levels",
                  "a design file needs four at most");
            throw Stop{};
        }
        Open open;
        open.node.kind = kind;
        open.node.at = at;
        open_.push_back(std::move(open));
    }

    void finish() {
        Node node = std::move(open_.back().node);
        open_.pop_back();
        place(std::move(node));
    }

    void place(Node node) {
        if (++nodes_ > k_most_nodes) {
            error(node.at, "there are more than " + std::to_string(k_most_nodes) + " values in the file",
                  "a design needs a few hundred at most");
            throw Stop{};
        }
        if (open_.empty()) {
            root_ = std::move(node);
            return;
        }
        Open& open = open_.back();
        if (open.node.kind == Node::Kind::list) {
            open.node.items.push_back(std::move(node));
            return;
        }
        if (!open.again)
            open.node.entries.push_back({std::move(open.key), open.key_at, std::move(node)});
        open.has_key = false;
    }

    std::string_view text_;
    const std::string& file_;
    std::vector<std::size_t> line_starts_;
    std::vector<Open> open_;
    Position home_; ///< of the last key
    std::optional<Node> root_;
    std::vector<DesignError> errors_;
    std::size_t nodes_ = 0;
    bool started_ = false;
};

/// yaml-cpp's own messages in a maker's words.
std::pair<std::string, std::string> in_plain_words(const std::string& message) {
    const std::string quote = "put quotes round a text that has \": \" in it";
    if (message == YAML::ErrorMsg::MAP_VALUE || message == YAML::ErrorMsg::MAP_KEY)
        return {"a second key and value on one line", quote};
    if (message == YAML::ErrorMsg::END_OF_MAP)
        return {"this line is neither a \"key: value\" nor part of the one above",
                "check its colon, and that it starts in the same column as its neighbours"};
    if (message == YAML::ErrorMsg::END_OF_SEQ)
        return {"this line is not part of the list above", "start each item with \"- \", all in the same column"};
    if (message == YAML::ErrorMsg::END_OF_MAP_FLOW)
        return {"a { is never closed", "close it with }"};
    if (message == YAML::ErrorMsg::END_OF_SEQ_FLOW)
        return {"a [ is never closed", "close it with ]"};
    if (message == YAML::ErrorMsg::FLOW_END)
        return {"a ] or } closes nothing", "take it out, or put quotes round the text"};
    if (message == YAML::ErrorMsg::EOF_IN_SCALAR)
        return {"a quoted text is never closed", "close it with the quote that it starts with"};
    if (message == YAML::ErrorMsg::TAB_IN_INDENTATION)
        return {"a line is indented with a tab", "indent with spaces"};
    if (message == YAML::ErrorMsg::BLOCK_ENTRY)
        return {"a list item stands where no list can be", "put it on a line of its own below its key"};
    if (message == YAML::ErrorMsg::UNKNOWN_TOKEN)
        return {"no value can start with this character", "put quotes round the text"};
    return {"the file can't be followed here (" + message + ")", "check the line's quotes, colons and indentation"};
}

/// A tab before the first word of the line that an error is on.
bool starts_with_tab(std::string_view text, int line) {
    std::size_t start = 0;
    for (int i = 1; i < line && start != std::string_view::npos; ++i) {
        start = text.find('\n', start);
        start = start == std::string_view::npos ? start : start + 1;
    }
    if (start == std::string_view::npos)
        return false;
    const std::size_t word = text.find_first_not_of(' ', start);
    return word != std::string_view::npos && text[word] == '\t';
}

DesignError at_top(const std::string& file, std::string message, std::string hint) {
    return {file, 1, 1, "", std::move(message), std::move(hint)};
}

constexpr const char* k_start_hint = "start with what is made and where: \"dial:\", \"place:\" and \"plate:\"";

} // namespace

DocumentReading read_document(std::string_view text, const std::string& file) {
    if (text.size() > k_largest_file_bytes)
        return {std::nullopt, {at_top(file, "the file is larger than 1 MB", "a design needs a few kB at most")}};
    const std::string plain = plain_lines(text);
    if (auto bad = bad_character(plain, file))
        return {std::nullopt, {*bad}};

    Builder builder{plain, file};
    bool whole = false;
    try {
        std::istringstream stream{plain};
        YAML::Parser parser{stream};
        while (parser.HandleNextDocument(builder)) {
        }
        whole = true;
    } catch (const Stop&) {
    } catch (const YAML::Exception& trouble) {
        const Position at = builder.place_of(trouble.mark);
        const auto [message, hint] = in_plain_words(
            starts_with_tab(plain, at.line) ? std::string{YAML::ErrorMsg::TAB_IN_INDENTATION} : trouble.msg);
        builder.error(at, message, hint);
    }
    DocumentReading reading = builder.take();
    if (!whole) {
        reading.root.reset();
    } else if (!reading.root || reading.root->kind == Node::Kind::empty) {
        reading.root.reset();
        reading.errors.push_back(at_top(file, "the file has nothing in it", k_start_hint));
    } else if (reading.root->kind != Node::Kind::mapping) {
        const Position at = reading.root->at;
        const char* what = reading.root->kind == Node::Kind::list ? "a list" : "a text";
        reading.errors.push_back({file, at.line, at.column, "",
                                  std::string{"the file is "} + what + " where keys with values are wanted",
                                  k_start_hint});
        reading.root.reset();
    }
    return reading;
}

std::string quoted(std::string_view text) {
    constexpr std::size_t k_longest = 60;
    std::string shown = "\"";
    for (std::size_t i = 0; i < text.size();) {
        const std::size_t length = std::max<std::size_t>(utf8_length(text, i), 1);
        if (i + length > k_longest) {
            shown += "…";
            break;
        }
        shown += text[i] == '\n' || text[i] == '\t' ? std::string{" "} : std::string{text.substr(i, length)};
        i += length;
    }
    return shown + '"';
}

} // namespace dialwright::cli
