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

    /// Where the innermost list or mapping starts that is not closed yet.
    [[nodiscard]] std::optional<Position> last_opened() const {
        return open_.empty() ? std::nullopt : std::optional{open_.back().node.at};
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
        if (!std::exchange(said_anchor_, true))
            error(place_of(mark), "\"&" + name + "\" is a YAML anchor, which a design file does without",
                  "write the value where it is needed; put quotes round a text that starts with &");
    }
    void OnAlias(const YAML::Mark& mark, YAML::anchor_t) override {
        if (!std::exchange(said_alias_, true))
            error(place_of(mark), "this is a YAML alias, which a design file does without",
                  "write the value here; put quotes round a text that starts with *");
        if (awaits_key())
            throw Stop{};
        Node node;
        node.kind = Node::Kind::refused;
        node.at = place_of(mark);
        place(std::move(node));
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
        refuse_unclosed_quote(mark, at);
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

    /// yaml-cpp takes all the rest of the file for the text of a quote that is never closed.
    void refuse_unclosed_quote(const YAML::Mark& mark, Position at) {
        const auto start = static_cast<std::size_t>(std::max(mark.pos, 0));
        if (start >= text_.size() || (text_[start] != '"' && text_[start] != '\''))
            return;
        const char quote = text_[start];
        for (std::size_t i = start + 1; i < text_.size(); ++i) {
            if (quote == '"' && text_[i] == '\\')
                ++i;
            else if (text_[i] == quote && quote == '\'' && i + 1 < text_.size() && text_[i + 1] == quote)
                ++i;
            else if (text_[i] == quote)
                return;
        }
        error(at, "a quoted text is never closed", "close it with the quote that it starts with");
        throw Stop{};
    }

    /// "plate: diameter" for a key of the innermost mapping.
    [[nodiscard]] std::string path_to(const std::string& key) const {
        std::string path;
        for (const Open& open : open_)
            if (open.has_key)
                path += open.key + ": ";
        return path + key;
    }

    void open_key(Position at, const std::string& key) {
        Open& open = open_.back();
        const Entry* before = open.node.find(key);
        if (before != nullptr)
            errors_.push_back({file_, at.line, at.column, path_to(key),
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
    bool started_ = false, said_anchor_ = false, said_alias_ = false;
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
    if (message == YAML::ErrorMsg::UNKNOWN_ANCHOR)
        return {"this is a YAML alias, which a design file does without",
                "write the value here; put quotes round a text that starts with *"};
    if (message.starts_with(YAML::ErrorMsg::INVALID_ESCAPE))
        return {"a \\ in double quotes starts a code that is not known", "write \\\\, or use single quotes"};
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

/// Where a tab stands among the spaces that a line starts with.
std::optional<Position> indenting_tab(std::string_view text, int line) {
    std::size_t start = 0;
    for (int i = 1; i < line && start != std::string_view::npos; ++i) {
        start = text.find('\n', start);
        start = start == std::string_view::npos ? start : start + 1;
    }
    const std::size_t word = text.find_first_not_of(' ', start);
    if (start == std::string_view::npos || word == std::string_view::npos || text[word] != '\t')
        return std::nullopt;
    return Position{line, static_cast<int>(word - start) + 1};
}

DesignError at_top(const std::string& file, std::string message, std::string hint) {
    return {file, 1, 1, "", std::move(message), std::move(hint)};
}

} // namespace

DocumentReading read_document(std::string_view text, const std::string& file, std::string_view start_hint) {
    if (text.size() > k_largest_file_bytes)
        return {std::nullopt, {at_top(file, "the file is larger than 1 MB", "a design needs a few kB at most")}};
    const std::string plain = plain_lines(text);
    if (const auto bad = first_bad_character(plain))
        return {std::nullopt, {{file, bad->at.line, bad->at.column, "", bad->message, bad->hint}}};

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
        const Position mark = builder.place_of(trouble.mark);
        const std::optional<Position> tab = indenting_tab(plain, mark.line);
        const auto [message, hint] = in_plain_words(tab ? YAML::ErrorMsg::TAB_IN_INDENTATION : trouble.msg);
        const bool unclosed =
            trouble.msg == YAML::ErrorMsg::END_OF_MAP_FLOW || trouble.msg == YAML::ErrorMsg::END_OF_SEQ_FLOW;
        builder.error(unclosed ? builder.last_opened().value_or(mark) : tab.value_or(mark), message, hint);
    }
    DocumentReading reading = builder.take();
    if (!whole) {
        reading.root.reset();
    } else if (!reading.root || reading.root->kind == Node::Kind::empty) {
        reading.root.reset();
        reading.errors.push_back(at_top(file, "the file has nothing in it", std::string{start_hint}));
    } else if (reading.root->kind != Node::Kind::mapping) {
        const Position at = reading.root->at;
        const char* what = reading.root->kind == Node::Kind::list ? "a list" : "a text";
        reading.errors.push_back({file, at.line, at.column, "",
                                  std::string{"the file is "} + what + " where keys with values are wanted",
                                  std::string{start_hint}});
        reading.root.reset();
    }
    return reading;
}

} // namespace dialwright::cli
