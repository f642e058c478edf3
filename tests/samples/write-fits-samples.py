"""Writes the FITS and gzip samples (tests/samples, tests/broken) and, beside each, what Astropy reads back from it: python3 write-fits-samples.py

Needs astropy (5.2 was used) and numpy. The same files come out each time.
"""

import gzip
import json
import math
import warnings
from pathlib import Path

import numpy as np
from astropy.io import fits
from astropy.io.fits.verify import VerifyWarning

FOLDER = Path(__file__).parent
ROWS = 6
RANDOM = np.random.default_rng(20261108)

warnings.simplefilter("ignore", VerifyWarning)


def column(name, kind, values, **more):
    return fits.Column(name=name, format=kind, array=values, **more)


def plain(value):
    """A cell as JSON: None where there is no value, flags as the number of marks in them."""
    if isinstance(value, (bool, np.bool_)):
        return int(value)
    if isinstance(value, np.ndarray):
        return int(value.sum())
    if isinstance(value, str):
        return value
    return float(value) if math.isfinite(value) else None


def cells(path, names, unit=1):
    with fits.open(path) as parts:
        data = parts[unit].data
        return {name: [plain(value) for value in data[name]] for name in names}


def whole_numbers(path, name, unit=1):
    """Identifiers with all their digits."""
    with fits.open(path) as parts:
        return [str(int(value)) for value in parts[unit].data[name]]


def write(name, parts, expected):
    """`expected` is made from the file as Astropy reads it back."""
    path = FOLDER / name
    fits.HDUList(parts).writeto(path, overwrite=True, checksum=False)
    with fits.open(path) as again:
        again.verify("exception")
    tell(path, expected(path))
    return path


def tell(path, expected):
    stem = path.name.split(".")[0]
    text = json.dumps(expected, indent=1)
    (FOLDER / f"{stem}.json").write_text(text + "\n")


def readings(read, band="V", mag="V", error="e_V"):
    return {band: {"mag": read[mag], "sigma_mag": read[error]}}


def positions():
    return [
        column("ra", "D", 132.8 + RANDOM.random(ROWS) / 10, unit="deg"),
        column("dec", "D", 11.8 + RANDOM.random(ROWS) / 10, unit="deg"),
    ]


def photometry():
    return [
        column("V", "E", RANDOM.uniform(9, 17, ROWS), unit="mag", disp="F8.3"),
        column("e_V", "E", RANDOM.uniform(0.005, 0.05, ROWS), unit="mag"),
    ]


def all_types():
    ids = np.array([2**62 + 1, 4611686018427387905 + 2, 604921038419226241, 3, 10**18 + 7, 2**63 - 1])
    single = RANDOM.normal(0, 1e3, ROWS).astype(np.float32)
    single[1], single[2], single[3], single[4] = np.nan, np.inf, 1e-45, -3.4e38
    double = RANDOM.normal(0, 1e-3, ROWS)
    double[1], double[2], double[3] = np.nan, -np.inf, 5e-324
    bits = RANDOM.integers(0, 2, (ROWS, 11)).astype(bool)
    table = fits.BinTableHDU.from_columns(
        [
            column("source_id", "K", ids),
            *positions(),
            *photometry(),
            column("flag", "L", np.array([False, True, False, False, True, False])),
            column("byte", "B", np.array([0, 1, 127, 128, 254, 255], dtype=np.uint8)),
            column("short", "I", np.array([0, 1, -1, 32767, -32768, 258], dtype=np.int16)),
            column("long", "J", np.array([0, 1, -1, 2**31 - 1, -(2**31), 16909060], dtype=np.int32)),
            column("wide", "K", np.array([0, 1, -1, 2**53, -(2**53), 2**40 + 3])),
            column("single", "E", single),
            column("double", "D", double),
            column("bits", "11X", bits),
            column("word", "12A", np.array(["", "a", "two words", "exactly12chr", "x  ", "tab"])),
            column("complex", "C", RANDOM.normal(size=ROWS) + 1j),
            column("complexes", "2M", RANDOM.normal(size=(ROWS, 2)) + 1j),
            column("singles", "3E", RANDOM.normal(size=(ROWS, 3))),
            column("nothing", "0J", np.zeros((ROWS, 0))),
        ],
        name="TYPES",
    )

    def expected(path):
        names = ["byte", "short", "long", "wide", "single", "double", "flag", "bits", "word"]
        read = cells(path, ["ra", "dec", "V", "e_V", "flag", *names])
        ids = whole_numbers(path, "source_id")
        return {
            "ids": ids,
            "columns": {"ra_deg": read["ra"], "dec_deg": read["dec"], "suspect": read["flag"]},
            "bands": readings(read),
            "problems": [],
            "cells": {"source_id": ids, **{name: read[name] for name in names}},
        }

    write("all-types.fits", [fits.PrimaryHDU(), table], expected)


def scaled():
    """Scaled, unsigned and missing values; the scaling is written by hand, so that what is stored is known."""
    stored = np.array([-32768, 0, 1, 2500, 4711, -5], dtype=np.int16)
    sigma = np.array([10, 20, 255, 40, 50, 1], dtype=np.uint8)
    table = fits.BinTableHDU.from_columns(
        [
            column("id", "K", np.array([1, 2**63 + 5, 3, 4, 2**64 - 1, 6], dtype=np.uint64), bzero=2**63),
            *positions(),
            column("V", "I", stored),
            column("e_V", "B", sigma),
            column("flag", "I", np.array([0, 1, 40000, 65535, 0, 0], dtype=np.uint16), bzero=2**15),
            column("unsigned", "J", np.array([0, 1, 2**31, 2**32 - 1, 7, 9], dtype=np.uint32), bzero=2**31),
            column("signed", "B", np.array([0, 127, 128, 129, 255, 5], dtype=np.uint8)),
            column("stretched", "E", np.array([0, 1, 2, -3, np.nan, 0.5], dtype=np.float32)),
        ],
        name="SCALED",
    )
    primary = fits.PrimaryHDU()
    path = FOLDER / "scaled.fits"
    fits.HDUList([primary, table]).writeto(path, overwrite=True)
    add_cards(
        path,
        {
            "TSCAL4": "0.001", "TZERO4": "12.5D0", "TNULL4": "-32768",
            "TSCAL5": "0.001", "TNULL5": "255",
            "TZERO8": "-128",
            "TSCAL9": "-2.5", "TZERO9": "100.0",
        },
    )
    with fits.open(path) as parts:
        data = parts[1].data
        read = {name: [plain(value) for value in data[name]] for name in data.names if name != "id"}
        ids = [str(int(value)) for value in data["id"]]
    mag, sigma_mag = read["V"], read["e_V"]
    # Astropy scales what stands for "no value" like any number; here it is none.
    mag[0], sigma_mag[2] = None, None
    expected_sigma = [None if m is None else (0.05 if s is None else s) for m, s in zip(mag, sigma_mag)]
    tell(
        path,
        {
            "ids": ids[1:],
            "columns": {
                "ra_deg": read["ra"][1:],
                "dec_deg": read["dec"][1:],
                "suspect": [int(value != 0) for value in read["flag"]][1:],
            },
            "bands": {"V": {"mag": mag[1:], "sigma_mag": expected_sigma[1:]}},
            "problems": ["no-errors"],
            "cells": {"id": ids, "V": mag, "e_V": sigma_mag, **{
                name: read[name] for name in ["flag", "unsigned", "signed", "stretched"]
            }},
        },
    )


def add_cards(path, cards):
    """Puts cards before the END of the first extension's header."""
    data = path.read_bytes()
    end = data.index(b"END" + b" " * 77, data.index(b"XTENSION"))
    text = "".join(f"{key:8s}= {value:>20s}".ljust(80) for key, value in cards.items()) + "END".ljust(80)
    rest = data[-(-(end + 80) // 2880) * 2880 :]
    head = data[:end] + text.encode()
    path.write_bytes(head.ljust(-(-len(head) // 2880) * 2880) + rest)


def ascii_table():
    table = fits.TableHDU.from_columns(
        [
            fits.Column(name="name", format="A10", array=np.array(["HD 1", "HD 22", "", "x", "HD 5", "six"]), ascii=True),
            fits.Column(name="ra", format="F10.5", array=132.8 + RANDOM.random(ROWS) / 10, unit="deg", ascii=True),
            fits.Column(name="dec", format="F10.5", array=11.8 + RANDOM.random(ROWS) / 10, unit="deg", ascii=True),
            fits.Column(name="V", format="E12.5", array=RANDOM.uniform(9, 17, ROWS), ascii=True),
            fits.Column(name="e_V", format="D14.6", array=RANDOM.uniform(0.01, 0.05, ROWS), ascii=True),
            fits.Column(name="flag", format="I4", array=np.array([0, 0, 4, 0, 0, 128]), null="-99", ascii=True),
        ],
        name="LETTERS",
    )

    def expected(path):
        read = cells(path, ["name", "ra", "dec", "V", "e_V", "flag"])
        return {
            "ids": read["name"],
            "columns": {
                "ra_deg": read["ra"], "dec_deg": read["dec"],
                "suspect": [int(value != 0) for value in read["flag"]],
            },
            "bands": readings(read),
            "problems": [],
            "cells": {name: read[name] for name in ["name", "V", "e_V", "flag"]},
        }

    write("ascii-table.fits", [fits.PrimaryHDU(), table], expected)


def several_parts():
    image = fits.PrimaryHDU(RANDOM.integers(0, 999, (7, 5)).astype(np.int16))
    image.header["FILTER"] = "B"
    image.header["OBJECT"] = "whole frame"
    cards = fits.BinTableHDU.from_columns([column("Field Header Card", "80A", np.array(["FILTER = 'B'"]))], name="CARDS")
    stars = fits.BinTableHDU.from_columns(
        [*positions(), column("mag", "D", RANDOM.uniform(9, 17, ROWS)), column("mag_error", "D", np.full(ROWS, 0.02))],
        name="STARS",
    )
    stars.header["FILTER"] = "V"
    other = fits.BinTableHDU.from_columns([*positions(), *photometry()], name="REFS")
    weights = fits.ImageHDU(RANDOM.random((4, 4)).astype(np.float32), name="WEIGHT")

    def expected(path):
        read = cells(path, ["ra", "dec", "mag", "mag_error"], "STARS")
        return {
            "facts": {"object": "whole frame"},
            "ids": [""] * ROWS,
            "columns": {"ra_deg": read["ra"], "dec_deg": read["dec"]},
            "bands": readings(read, "V", "mag", "mag_error"),
            "problems": ["more-tables"],
        }

    write("several-parts.fits", [image, cards, stars, weights, other], expected)


def strings_and_bits():
    bits = np.zeros((ROWS, 16), dtype=bool)
    bits[2, 0] = bits[4, 15] = True
    table = fits.BinTableHDU.from_columns(
        [
            column("star", "16A", np.array(["M67 1", "M67 2 ", "Ångström".encode(), "M67 4", "", "M67 6"], dtype="S16")),
            column("RAJ2000", "12A", np.array([f"08 51 {second:05.2f}" for second in range(ROWS)]), unit='"h:m:s"'),
            column("DEJ2000", "12A", np.array([f"+11 48 {second:04.1f}" for second in range(ROWS)]), unit='"d:m:s"'),
            column("filter", "8A", np.array(["V", "V", "V", "B", "V", "V"])),
            column("mag", "D", RANDOM.uniform(9, 17, ROWS)),
            column("mag_error", "D", np.full(ROWS, 0.01)),
            column("flags", "16X", bits),
        ],
    )
    path = FOLDER / "strings-and-bits.fits"
    fits.HDUList([fits.PrimaryHDU(), table]).writeto(path, overwrite=True)
    with fits.open(path) as parts:
        mag = [float(value) for value in parts[1].data["mag"]]
        marks = [plain(value) for value in parts[1].data["flags"]]
    v = [None if row == 3 else value for row, value in enumerate(mag)]
    b = [value if row == 3 else None for row, value in enumerate(mag)]
    tell(
        path,
        {
            "ids": ["M67 1", "M67 2", "Ångström", "M67 4", "", "M67 6"],
            "columns": {
                # 15 degrees an hour, by hand.
                "ra_deg": [132.75 + second / 240 for second in range(ROWS)],
                "dec_deg": [11.8 + second / 3600 for second in range(ROWS)],
                "suspect": [int(value > 0) for value in marks],
            },
            "bands": {
                "B": {"mag": b, "sigma_mag": [None if value is None else 0.01 for value in b]},
                "V": {"mag": v, "sigma_mag": [None if value is None else 0.01 for value in v]},
            },
            "problems": [],
            "cells": {"flags": marks},
        },
    )


def lists():
    ragged = np.empty(ROWS, dtype=object)
    ragged[:] = [RANDOM.random(row).astype(np.float32) for row in range(ROWS)]
    table = fits.BinTableHDU.from_columns(
        [
            column("trace", "PE()", ragged),
            column("id", "6A", np.array([f"s{row}" for row in range(ROWS)])),
            column("B", "QE()", ragged),
            *positions(),
            *photometry(),
            column("e_B", "2E", np.zeros((ROWS, 2))),
        ],
    )

    def expected(path):
        read = cells(path, ["id", "ra", "dec", "V", "e_V"])
        return {
            "ids": read["id"],
            "columns": {"ra_deg": read["ra"], "dec_deg": read["dec"]},
            "bands": readings(read),
            "problems": ["many-values", "many-values"],
        }

    write("lists.fits", [fits.PrimaryHDU(), table], expected)


def header_facts():
    primary = fits.PrimaryHDU()
    # Longer than a card, with quotes and a slash: Astropy 5.2 writes it well, but reads it back cut.
    field = "NGC 'two' / 7789 " + "and a long name " * 6
    for key, value in {
        "DATE-OBS": "2026-11-08T21:14:03", "EXPTIME": 60.0, "FILTER": "V", "AIRMASS": 1.213, "FWHM": 2.1,
        "ZP": 22.31, "SKYMAG": 20.4, "OBJECT": field,
    }.items():
        primary.header[key] = value
    primary.header["HIERARCH ESO DET WIN1 STRX"] = 17
    primary.header["HISTORY"] = "AIRMASS = 9.9 is not a keyword here"
    primary.header["COMMENT"] = "nor here: FWHM = 99"
    table = fits.BinTableHDU.from_columns(
        [*positions(), column("mag", "E", RANDOM.uniform(9, 17, ROWS)), column("mag_error", "E", np.full(ROWS, 0.02))],
    )
    table.header["FWHM"] = 1.75
    path = FOLDER / "header-facts.fits"
    fits.HDUList([primary, table]).writeto(path, overwrite=True)
    read = cells(path, ["ra", "dec", "mag", "mag_error"])
    with fits.open(path) as parts:
        facts = {
            "exposure_s": parts[0].header["EXPTIME"], "fwhm_arcsec": parts[1].header["FWHM"],
            "zeroPoint_mag": parts[0].header["ZP"], "sky_magPerArcsec2": parts[0].header["SKYMAG"],
            "airmass": parts[0].header["AIRMASS"], "object": field.strip(),
        }
    packed = path.with_suffix(".fits.gz")
    packed.write_bytes(gzip.compress(path.read_bytes(), mtime=0))
    path.unlink()
    tell(
        packed,
        {
            "mid": "2026-11-08T21:14:33.000Z",
            "facts": facts,
            "ids": [""] * ROWS,
            "columns": {"ra_deg": read["ra"], "dec_deg": read["dec"]},
            "bands": readings(read, "V", "mag", "mag_error"),
            "problems": [],
        },
    )


def broken():
    """Files that cannot be read, or not wholly; each is told in words in tests/catalogue/broken.test.ts."""
    folder = FOLDER.parent / "broken"

    def save(name, parts, change=lambda data: data):
        path = folder / name
        fits.HDUList(parts).writeto(path, overwrite=True)
        path.write_bytes(change(path.read_bytes()))

    def table(*more, rows=ROWS, **keywords):
        columns = [*positions(), *photometry(), *more]
        made = fits.BinTableHDU.from_columns(columns, **keywords)
        made.data = made.data[:rows]
        return made

    def card(key, old, new):
        return lambda data: data.replace(f"{key:8s}= {old:>20s}".encode(), f"{key:8s}= {new:>20s}".encode())

    image = fits.PrimaryHDU(np.zeros((3, 3), dtype=np.int16))
    save("not-a-table.image.fits", [image])
    save("not-a-table.images.fits", [image, fits.CompImageHDU(np.zeros((9, 9), dtype=np.int16))])
    save("empty-file.table.fits", [fits.PrimaryHDU(), table(rows=0)])
    save("cut-short.header.fits", [fits.PrimaryHDU(), table()], lambda data: data[: 2880 + 1000])
    save("cut-short.rows.fits", [fits.PrimaryHDU(), table()], lambda data: data[: 2 * 2880 + 2 * 24 + 5])
    save("cut-short.part.fits", [fits.PrimaryHDU(), table(), image_part()], lambda data: data[:-2880])
    save("cut-short.absurd.fits", [fits.PrimaryHDU(), table()], card("NAXIS2", "6", "9999999999999"))
    save("damaged.format.fits", [fits.PrimaryHDU(), table()], lambda data: data.replace(b"'E       '", b"'8Y      '"))
    save("damaged.width.fits", [fits.PrimaryHDU(), table()], lambda data: data.replace(b"'E       '", b"'99999E  '"))
    save("damaged.size.fits", [fits.PrimaryHDU(), table()], card("NAXIS1", "24", "2400.5"))
    save("too-large.columns.fits", [fits.PrimaryHDU(), table()], card("TFIELDS", "4", "999"))
    save("many-values.fits", [fits.PrimaryHDU(), table(column("B", "3E", np.zeros((ROWS, 3))))])
    save("more-tables.fits", [fits.PrimaryHDU(), table(name="FIRST"), table(), table(name="LAST")])
    text = b"id,ra,dec,V,e_V\n" + b"".join(b"s%d,%d,10,12.5,0.01\n" % (row, row) for row in range(99))
    packed = gzip.compress(text, mtime=0)
    (folder / "cut-short.csv.gz").write_bytes(packed[:-20])
    (folder / "damaged.csv.gz").write_bytes(packed[:-8] + b"\0\0\0\0" + packed[-4:])


def image_part():
    return fits.ImageHDU(np.zeros((30, 30), dtype=np.float32))


for make in [all_types, scaled, ascii_table, several_parts, strings_and_bits, lists, header_facts, broken]:
    make()
