# SPDX-License-Identifier: MIT
"""Reads a TrueType file by the OpenType specification alone (tables head, maxp, hhea, hmtx, cmap, loca, glyf, kern).

Usage: truetype_facts.py FONT TEXT
Prints, in units of the font: the em, the height of H, the advance of TEXT without and with kerning, and the box of the
first character (left, bottom, right, top). A second route to what the lettering draws.
"""
import struct
import sys


def read(form, data, at):
    return struct.unpack_from(">" + form, data, at)


def tables(data):
    count = read("H", data, 4)[0]
    entries = (read("4sIII", data, 12 + 16 * i) for i in range(count))
    return {tag.decode(): data[offset:offset + length] for tag, _, offset, length in entries}


def characters(cmap):
    """Character to glyph, from the format 4 table for Unicode on Windows (3, 1)."""
    for i in range(read("H", cmap, 2)[0]):
        platform, encoding, offset = read("HHI", cmap, 4 + 8 * i)
        if (platform, encoding) == (3, 1) and read("H", cmap, offset)[0] == 4:
            break
    else:
        raise SystemExit("no format 4 cmap")
    segments = read("H", cmap, offset + 6)[0] // 2
    at = offset + 14
    ends = read(f"{segments}H", cmap, at)
    starts = read(f"{segments}H", cmap, at + 2 * segments + 2)
    deltas = read(f"{segments}H", cmap, at + 4 * segments + 2)
    ranges_at = at + 6 * segments + 2
    glyphs = {}
    for i, (start, end, delta) in enumerate(zip(starts, ends, deltas)):
        shift = read("H", cmap, ranges_at + 2 * i)[0]
        for code in range(start, min(end, 0xFFFE) + 1):
            glyph = code if shift == 0 else read("H", cmap, ranges_at + 2 * i + shift + 2 * (code - start))[0]
            glyphs[code] = (glyph + delta) & 0xFFFF if shift == 0 or glyph else 0
    return glyphs


def kerning(kern):
    """Pairs of the horizontal format 0 tables."""
    pairs = {}
    at = 4
    for _ in range(read("H", kern, 2)[0]):
        _, _, coverage = read("HHH", kern, at)
        count = read("H", kern, at + 6)[0]
        if coverage >> 8 == 0 and coverage & 1:
            for i in range(count):
                left, right, value = read("HHh", kern, at + 14 + 6 * i)
                pairs[left, right] = value
        at += 14 + 6 * count  # the length field is too short for large tables
    return pairs


def main(path, text):
    with open(path, "rb") as file:
        font = tables(file.read())
    em = read("H", font["head"], 18)[0]
    long_offsets = read("h", font["head"], 50)[0] == 1
    wide = read("H", font["hhea"], 34)[0]
    glyph_of = characters(font["cmap"])

    def advance(glyph):
        return read("H", font["hmtx"], 4 * min(glyph, wide - 1))[0]

    def box(glyph):
        offset = read("I", font["loca"], 4 * glyph)[0] if long_offsets else 2 * read("H", font["loca"], 2 * glyph)[0]
        return read("hhhh", font["glyf"], offset + 2)

    line = [glyph_of[ord(c)] for c in text]
    plain = sum(map(advance, line))
    pairs = kerning(font["kern"]) if "kern" in font else {}
    kerned = plain + sum(pairs.get(pair, 0) for pair in zip(line, line[1:]))
    _, bottom, _, top = box(glyph_of[ord("H")])
    print(em, top - bottom, plain, kerned, *box(line[0]))


main(sys.argv[1], sys.argv[2])
