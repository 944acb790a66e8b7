"""Draws the letters of key images into core/raster/glyphs.ts, from the Inter font beside this file.

Run by hand with Python 3 and Pillow after a change of font, size or letters: python3 assets/makeGlyphs.py
"""

import pathlib

from PIL import Image, ImageDraw, ImageFont

HERE = pathlib.Path(__file__).parent
SIZE_PX = 15
LETTERS = [*map(chr, range(0x20, 0x7F)), *"°²±µ·×÷–—−…’“”≤≥√→≠�"]
LETTERS += [chr(code) for code in range(0xC0, 0x100) if chr(code) not in LETTERS]


def font(weight):
    made = ImageFont.truetype(str(HERE / "fonts" / "inter-latin-wght-normal.woff2"), SIZE_PX)
    made.set_variation_by_axes([weight])
    return made


def main():
    regular = font(500)
    ascent, descent = regular.getmetrics()
    height = ascent + descent
    lines, coverage = [], bytearray()
    for letter in LETTERS:
        advance = regular.getlength(letter)
        width = max(1, round(advance) + 1)
        cell = Image.new("L", (width, height))
        ImageDraw.Draw(cell).text((0, 0), letter, font=regular, fill=255)
        lines.append([ord(letter), width, round(advance * 64) / 64])
        coverage += bytes(value >> 4 for value in cell.tobytes())
    table = wrapped(" ".join(f"{code},{width},{advance}" for code, width, advance in lines))
    digits = wrapped("".join(f"{value:x}" for value in coverage))
    (HERE.parent / "core" / "raster" / "glyphs.ts").write_text(
        "// Made by assets/makeGlyphs.py from the Inter font (SIL Open Font License, assets/fonts/OFL.txt).\n\n"
        "/** Height of every glyph, and of its base line from the top, px. */\n"
        f"export const GLYPH_HEIGHT_PX = {height};\nexport const GLYPH_ASCENT_PX = {ascent};\n\n"
        "/** Code point, width of the cell and advance in px of each glyph, in the order of the coverage. */\n"
        f"export const GLYPH_TABLE =\n  {table};\n\n"
        "/** Coverage of all cells, row after row: one hexadecimal digit a pixel. */\n"
        f"export const GLYPH_COVERAGE =\n  {digits};\n"
    )


def wrapped(text):
    return " +\n  ".join(f"'{text[i : i + 90]}'" for i in range(0, len(text), 90))


main()
