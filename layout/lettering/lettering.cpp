// SPDX-License-Identifier: MIT
#include "layout/lettering/lettering.hpp"

#include "layout/lettering/font_face.hpp"
#include "layout/lettering/font_files.hpp"
#include "layout/lettering/text_runs.hpp"

#include <cmath>
#include <hb.h>
#include <numbers>
#include <optional>
#include <stdexcept>
#include <utility>

namespace dialwright::layout {
namespace {

/// Characters [start, end) of the text that one face draws in one script and direction.
struct Run {
    std::size_t start = 0, end = 0;
    const FontFace* face = nullptr;
    Script script = 0;
    std::uint8_t level = 0;
};

Path scaled(const Path& path, double scale, Point shift) {
    const auto placed = [&](Point p) { return Point{shift.x_mm + p.x_mm * scale, shift.y_mm + p.y_mm * scale}; };
    Path result{placed(path.start), {}, path.closed};
    result.pieces.reserve(path.pieces.size());
    for (const Piece& piece : path.pieces) {
        if (const auto* curve = std::get_if<CurveTo>(&piece))
            result.pieces.emplace_back(CurveTo{placed(curve->control_1), placed(curve->control_2), placed(curve->to)});
        else
            result.pieces.emplace_back(LineTo{placed(end_of(piece))}); // outlines of fonts hold no arcs
    }
    return result;
}

/// Letters of these scripts hang together, and space between them would tear the line of the pen.
bool is_joined(Script script) {
    return script == HB_SCRIPT_ARABIC || script == HB_SCRIPT_SYRIAC || script == HB_SCRIPT_NKO ||
           script == HB_SCRIPT_MONGOLIAN || script == HB_SCRIPT_DEVANAGARI || script == HB_SCRIPT_BENGALI;
}

/// Builds a line from left to right, one run after another.
class Setter {
  public:
    Setter(std::u32string_view text, double size_mm, double tracking_mm)
        : text_{text}, size_mm_{size_mm}, tracking_mm_{tracking_mm}, buffer_{hb_buffer_create()} {}
    ~Setter() { hb_buffer_destroy(buffer_); }
    Setter(const Setter&) = delete;
    Setter& operator=(const Setter&) = delete;

    void add(const Run& run) {
        shape(run);
        unsigned count = 0;
        const hb_glyph_info_t* infos = hb_buffer_get_glyph_infos(buffer_, &count);
        const hb_glyph_position_t* places = hb_buffer_get_glyph_positions(buffer_, &count);
        const double scale = size_mm_ / run.face->cap_height();
        for (unsigned i = 0; i < count; ++i) {
            const bool starts = i == 0 || infos[i].cluster != infos[i - 1].cluster;
            if (starts)
                start_glyph(!is_joined(run.script));
            add_outlines(run, infos[i], places[i], scale);
        }
    }

    [[nodiscard]] LetteredLine finished() && {
        finish_glyph(0.0);
        return std::move(line_);
    }

  private:
    void shape(const Run& run) {
        hb_buffer_clear_contents(buffer_);
        hb_buffer_add_codepoints(buffer_, reinterpret_cast<const hb_codepoint_t*>(text_.data()),
                                 static_cast<int>(text_.size()), static_cast<unsigned>(run.start),
                                 static_cast<int>(run.end - run.start));
        hb_buffer_set_direction(buffer_, run.level % 2 == 1 ? HB_DIRECTION_RTL : HB_DIRECTION_LTR);
        hb_buffer_set_script(buffer_, static_cast<hb_script_t>(run.script));
        // No language: the letters must not depend on the machine's user.
        const auto feature = [](hb_tag_t tag, std::uint32_t value) {
            return hb_feature_t{tag, value, HB_FEATURE_GLOBAL_START, HB_FEATURE_GLOBAL_END};
        };
        const hb_feature_t wanted[] = {feature(HB_TAG('l', 'n', 'u', 'm'), 1), feature(HB_TAG('l', 'i', 'g', 'a'), 0),
                                       feature(HB_TAG('c', 'l', 'i', 'g'), 0)};
        const bool apart = tracking_mm_ != 0.0 && !is_joined(run.script);
        hb_shape(run.face->shaper(), buffer_, wanted, apart ? 3U : 1U);
    }

    void start_glyph(bool tracked) {
        finish_glyph(tracked ? tracking_mm_ : 0.0);
        line_.glyphs.emplace_back().pen_x_mm = pen_mm_;
    }

    void finish_glyph(double tracking_mm) {
        line_.advance_mm = pen_mm_;
        if (line_.glyphs.empty())
            return;
        line_.glyphs.back().advance_mm = pen_mm_ - line_.glyphs.back().pen_x_mm;
        pen_mm_ += tracking_mm;
    }

    void add_outlines(const Run& run, const hb_glyph_info_t& info, const hb_glyph_position_t& place, double scale) {
        const FontFace::Shape& shape = run.face->shape(info.codepoint);
        if (info.codepoint == 0)
            throw LetteringError("no installed font draws " + named(text_[info.cluster]) +
                                 ": install one that does, or change the text");
        Glyph& glyph = line_.glyphs.back();
        const Point shift{pen_mm_ - glyph.pen_x_mm + place.x_offset * scale, place.y_offset * scale};
        for (const Path& path : shape.outlines)
            glyph.outlines.push_back(scaled(path, scale, shift));
        if (!shape.box.empty()) {
            const double x = glyph.pen_x_mm + shift.x_mm;
            line_.ink.add(Point{x + shape.box.left_mm * scale, shift.y_mm + shape.box.bottom_mm * scale});
            line_.ink.add(Point{x + shape.box.right_mm * scale, shift.y_mm + shape.box.top_mm * scale});
        }
        pen_mm_ += place.x_advance * scale;
    }

    std::u32string_view text_;
    double size_mm_, tracking_mm_;
    hb_buffer_t* buffer_;
    double pen_mm_ = 0.0;
    LetteredLine line_;
};

void add_turned(std::vector<Path>& to, const std::vector<Path>& outlines, const Placing& placing) {
    for (const Path& path : outlines)
        to.push_back(placing(path));
}

} // namespace

struct Lettering::Faces {
    std::string family;
    bool italic = false, bold = false;
    FontFile file;
    std::unique_ptr<FontFace> own;
    std::optional<StandIns> stand_ins; ///< sorted when first needed
    /// Of the stand-ins, when first needed; holds nullptr for one that cannot be read.
    std::vector<std::optional<std::unique_ptr<FontFace>>> opened;

    const FontFace& face_for(std::u32string_view letter);
    std::vector<Run> runs(std::u32string_view text);
};

/// The family itself where it can, else the first stand-in that draws the letter with all its marks.
const FontFace& Lettering::Faces::face_for(std::u32string_view letter) {
    if (own->draws(letter))
        return *own;
    if (!stand_ins) {
        stand_ins.emplace(family, italic, bold);
        opened.resize(stand_ins->size());
    }
    for (std::size_t i = 0; i < opened.size(); ++i) {
        if (!stand_ins->lists(i, letter.front()))
            continue;
        if (!opened[i])
            opened[i] = FontFace::opened(stand_ins->file(i));
        if (*opened[i] && (*opened[i])->draws(letter))
            return **opened[i];
    }
    const char32_t at_fault = [&] {
        for (const char32_t character : letter)
            if (!own->draws({&character, 1}))
                return character;
        return letter.front();
    }();
    throw LetteringError("no installed font draws " + named(at_fault) + ": install one that does, or change the text");
}

std::vector<Run> Lettering::Faces::runs(std::u32string_view text) {
    const std::vector<std::uint8_t> levels = direction_levels(text);
    const std::vector<Script> scripts = scripts_of(text);
    std::vector<Run> found;
    for (std::size_t start = 0, end = 0; start < text.size(); start = end) {
        end = start + 1;
        while (end < text.size() && joins_letter_before(text[end]))
            ++end;
        const FontFace& face = face_for(text.substr(start, end - start));
        const bool goes_on = !found.empty() && found.back().face == &face && found.back().level == levels[start] &&
                             found.back().script == scripts[start];
        if (goes_on)
            found.back().end = end;
        else
            found.push_back({start, end, &face, scripts[start], levels[start]});
    }
    return found;
}

Lettering::Lettering(std::string_view family, bool italic, bool bold) : faces_{std::make_unique<Faces>()} {
    faces_->family = family;
    faces_->italic = italic;
    faces_->bold = bold;
    faces_->file = font_file(family, italic, bold);
    faces_->own = FontFace::opened(faces_->file);
    if (!faces_->own)
        throw LetteringError("the font file " + faces_->file.path + " of \"" + faces_->family +
                             "\" cannot be read: install the font again or name another under lettering: font");
}

Lettering::~Lettering() = default;
Lettering::Lettering(Lettering&&) noexcept = default;
Lettering& Lettering::operator=(Lettering&&) noexcept = default;

const std::string& Lettering::file() const {
    return faces_->file.path;
}

LetteredLine Lettering::line(std::string_view text, double size_mm, double tracking_mm) const {
    if (!(size_mm > 0.0) || !std::isfinite(size_mm) || !std::isfinite(tracking_mm))
        throw std::invalid_argument("the size of lettering must be above zero, its tracking finite");
    const std::u32string characters = decoded(text);
    const std::vector<Run> runs = faces_->runs(characters);
    std::vector<std::uint8_t> levels;
    for (const Run& run : runs)
        levels.push_back(run.level);
    Setter setter{characters, size_mm, tracking_mm};
    for (const std::size_t place : visual_order(levels))
        setter.add(runs[place]);
    return std::move(setter).finished();
}

std::vector<Path> set_straight(const LetteredLine& line, Point at, Angle turn) {
    std::vector<Path> paths;
    for (const Glyph& glyph : line.glyphs) {
        const Point shift{at.x_mm + glyph.pen_x_mm * cos(turn), at.y_mm + glyph.pen_x_mm * sin(turn)};
        add_turned(paths, glyph.outlines, Placing{turn, shift});
    }
    return paths;
}

std::vector<Path> set_on_circle(const LetteredLine& line, Point centre, double radius_mm, Angle middle,
                                bool heads_inward) {
    if (!(radius_mm > 0.0))
        throw std::invalid_argument("lettering needs a circle with a radius above zero");
    const double way = heads_inward ? 1.0 : -1.0; // anticlockwise or clockwise as the pen goes on
    std::vector<Path> paths;
    for (const Glyph& glyph : line.glyphs) {
        const double half_mm = glyph.advance_mm / 2.0;
        const double along_mm = glyph.pen_x_mm + half_mm - line.advance_mm / 2.0;
        const Angle at = middle + Angle::radians(way * along_mm / radius_mm);
        const Angle turn = at + Angle::radians(way * std::numbers::pi / 2.0);
        const Point shift{centre.x_mm + radius_mm * cos(at) - half_mm * cos(turn),
                          centre.y_mm + radius_mm * sin(at) - half_mm * sin(turn)};
        add_turned(paths, glyph.outlines, Placing{turn, shift});
    }
    return paths;
}

} // namespace dialwright::layout
