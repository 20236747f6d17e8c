"""Makes the subset fonts beside this file: only the characters that the page shows, without hinting, under new names.

The names are new because a changed font may not carry the reserved name "Source" (SIL Open Font License, clause 3).
To run it: in an empty folder, `npm install source-sans@3.52.0 @fontsource/stix-two-text@5.3.0 jetbrains-mono@1.0.6`,
then `/usr/bin/python3 PATH/TO/make.py` there (Debian's packages python3-fonttools and python3-brotli).
"""

from pathlib import Path

from fontTools import merge, subset
from fontTools.ttLib import TTFont
from fontTools.varLib import instancer

HERE = Path(__file__).parent
PACKAGES = Path("node_modules")

GREEK = "391-3A1,3A3-3A9,3B1-3C9,3D1,3D5,3F5"
TEXT = (
    "20-7E,A0-17F,192,2C6,2DA,2DC," + GREEK + ",2002,2003,2007-200A,2010-2015,2018-201E,2020-2022,2026,202F,2030,"
    "2032,2033,2039,203A,2044,2070,2074-208E,20AC,2113,2122,2126,212B,2190-2193,21B5,2202,2206,220F,2211,2212,2215,"
    "2219-221E,222B,2248,2260,2264,2265,25A0,25B2,25B4,25B6,25B8,25BC,25BE,25C6,25CB,25CF,2713,2717"
)
SYMBOLS = "20-7E,B0,B2,B3,B5,B7,B9,D7,F7," + GREEK + ",2010-2014,2212"
ENTRIES = (
    "20-7E,A0,B0-B5,B7,B9,C4,C5,C9,D6,D7,DC,DF,E0,E4-E9,F1,F6,F7,F8,FC," + GREEK + ",2010-2014,2018-201D,2026,202F,"
    "2070,2074-2089,2126,2190-2193,21B5,2212,221A,221E,2211,2248,2260,2264,2265,2713"
)


def code_points(ranges):
    """The code points of a list such as "20-7E,B0"."""
    points = set()
    for part in ranges.split(","):
        first, _, last = part.partition("-")
        points |= set(range(int(first, 16), int(last or first, 16) + 1))
    return points


def write(font, ranges, features, family, style, name):
    """Subsets a font, renames it and writes it as WOFF2."""
    font.save("whole.ttf")
    font = TTFont("whole.ttf")
    options = subset.Options()
    options.layout_features = features
    options.hinting = False
    options.notdef_outline = True
    options.name_IDs = [0, 1, 2, 4, 6, 13, 14]
    subsetter = subset.Subsetter(options)
    subsetter.populate(unicodes=code_points(ranges))
    subsetter.subset(font)
    names = {1: family, 2: style, 4: f"{family} {style}", 6: f"{family}-{style}".replace(" ", "")}
    for record in font["name"].names:
        record.string = names.get(record.nameID, record.string)
    font.flavor = "woff2"
    font.save(HERE / name)


POSITIONS = ["kern", "mark", "mkmk", "ccmp", "locl"]

sans = TTFont(PACKAGES / "source-sans/VF/SourceSans3VF-Upright.ttf")
sans = instancer.instantiateVariableFont(sans, {"wght": (400, 600)})
write(sans, TEXT, [*POSITIONS, "sups", "subs"], "Levelwright Sans", "Regular", "levelwright-sans.woff2")

for slope, style in (("normal", "Regular"), ("italic", "Italic")):
    parts = [
        str(PACKAGES / f"@fontsource/stix-two-text/files/stix-two-text-{script}-400-{slope}.woff2")
        for script in ("latin", "greek")
    ]
    serif = merge.Merger().merge(parts)
    write(serif, SYMBOLS, POSITIONS, "Levelwright Serif", style, f"levelwright-serif-{style.lower()}.woff2")

for style in ("Regular", "Medium"):
    mono = TTFont(PACKAGES / f"jetbrains-mono/fonts/webfonts/JetBrainsMonoNL-{style}.woff2")
    write(mono, ENTRIES, POSITIONS[1:], "Levelwright Mono", style, f"levelwright-mono-{style.lower()}.woff2")
