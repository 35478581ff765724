"""FITS files written by astropy into the folder that is asked for, and what astropy itself reads from them: JSON out."""

import json
import math
import os
import sys
import warnings

import numpy as np
from astropy.io import fits
from astropy.table import MaskedColumn, Table

warnings.simplefilter("ignore")
random = np.random.default_rng(20160101)


def cell(value):
    """A cell as text: all digits of a number, None for a blank."""
    if value is np.ma.masked:
        return None
    if isinstance(value, (bool, np.bool_)):
        return "true" if value else "false"
    if isinstance(value, (int, np.integer)):
        return str(int(value))
    if isinstance(value, (float, np.floating)):
        return None if math.isnan(value) else repr(float(value))
    text = value.decode("utf-8") if isinstance(value, bytes) else str(value)
    return text.rstrip() or None


def columns_of(table, names=None):
    return [{"name": name, "cells": [cell(value) for value in table[name]]} for name in names or table.colnames]


def whole_numbers(dtype, rows):
    """The limits of a type, and what lies between."""
    limits = np.iinfo(dtype)
    ends = [limits.min, limits.max, 0, 1, limits.max - 1]
    return np.array(ends + [int(n) for n in random.integers(limits.min, limits.max, rows - len(ends), dtype=dtype)], dtype)


def floats(dtype, rows):
    limits = np.finfo(dtype)
    ends = [0.0, -0.0, limits.max, limits.tiny, limits.smallest_subnormal, np.nan, np.inf, -np.inf, 0.1]
    more = random.normal(size=rows - len(ends)) * 10.0 ** random.integers(-30, 30, rows - len(ends))
    return np.array(list(ends) + list(more)).astype(dtype)


def texts(rows, width):
    letters = "abcXYZ 019-+.'/&\\"
    return np.array(["".join(random.choice(list(letters), random.integers(0, width + 1))) for _ in range(rows)])


def every_type(rows=200):
    table = Table()
    for dtype in ["u1", "i2", "u2", "i4", "u4", "i8", "u8"]:
        table[dtype] = whole_numbers(dtype, rows)
    for dtype in ["f4", "f8"]:
        table[dtype] = floats(dtype, rows)
    table["text"] = texts(rows, 12)
    table["logical"] = random.random(rows) > 0.5
    table["u1"].unit = "mag"
    return table


def write(table, path, **more):
    table.write(path, format="fits", overwrite=True, **more)
    return columns_of(Table.read(path, format="fits", hdu=1))


def types(path):
    return {"columns": write(every_type(), path)}


def no_rows(path):
    table = every_type()
    # astropy cannot write unsigned columns without rows.
    table.remove_columns(["u2", "u4", "u8"])
    return {"columns": write(table[:0], path)}


def one_row(path):
    return {"columns": write(every_type()[:1], path)}


def many_rows(path):
    rows = 40_000
    table = Table({"id": random.integers(2**61, 2**62, rows), "mag": random.normal(10, 2, rows).astype("f4")})
    return {"columns": write(table, path)}


def many_columns(path):
    """As many as the format allows; astropy writes no more either."""
    table = Table({f"c{n}": random.integers(-99, 99, 3).astype("f4" if n % 2 else "i2") for n in range(999)})
    return {"columns": write(table, path)}


def masked(path):
    rows = 50
    table = Table(masked=True)
    for dtype in ["i2", "i4", "i8", "f4", "f8"]:
        values = random.integers(-100, 100, rows).astype(dtype)
        table[dtype] = MaskedColumn(values, mask=random.random(rows) < 0.3)
    table["text"] = MaskedColumn(np.array([f"t{n}" for n in range(rows)]), mask=random.random(rows) < 0.3)
    return {"columns": write(table, path)}


def masked_unsigned(path):
    """astropy writes TNULL of unsigned columns as the number that it stands for, not as what is stored."""
    rows = 20
    table = Table(masked=True)
    for dtype in ["u2", "u4", "u8"]:
        table[dtype] = MaskedColumn(np.arange(rows).astype(dtype), mask=np.arange(rows) % 4 == 0)
    write(table, path)
    return {"columns": [], "masked": rows // 4 * 3}


def unicode_texts(path):
    names = ["Müller", "日本の星", "α Cen", "plain", "", "É", "𝛼"]
    table = Table({"name": np.array([name.encode("utf-8") for name in names]), "n": np.arange(len(names))})
    return {"columns": write(table, path)}


def scaled(path):
    """astropy cannot scale back with this numpy; it writes the stored numbers, and their scales go in afterwards."""
    stored = [-32768, -99, 0, 1, 32767]
    columns = [
        fits.Column("i", "I", array=np.array(stored)),
        fits.Column("j", "J", array=np.array(stored)),
        fits.Column("signed", "B", array=np.array([0, 1, 127, 128, 255])),
        fits.Column("k", "K", array=np.array(stored) * 2**30),
        fits.Column("e", "E", array=np.array(stored) / 7),
        fits.Column("d", "D", array=np.array(stored) / 7),
        fits.Column("bits", "X", array=np.array([[1], [0], [1], [1], [0]], bool)),
    ]
    scales = [(0.01, 20.0), (2.0, -7.0), (1, -128), (0.5, 0), (0.5, 1.0), (1e10, -3.0)]
    hdu = fits.BinTableHDU.from_columns(columns)
    for place, (scale, zero) in enumerate(scales, 1):
        hdu.header[f"XSCAL{place}"] = scale
        # astropy stumbles over a zero point of scaled 64-bit numbers.
        if zero != 0:
            hdu.header[f"XZERO{place}"] = zero
    hdu.writeto(path, overwrite=True)
    with open(path, "r+b") as file:
        content = file.read().replace(b"XSCAL", b"TSCAL").replace(b"XZERO", b"TZERO")
        file.seek(0)
        file.write(content)
    table = Table.read(path, format="fits")
    table["bits"] = np.array(table["bits"]).reshape(-1)
    return {"columns": columns_of(table)}


def arrays(path):
    """Columns that are left out lie between those that are read."""
    rows = 6
    lengths = [0, 3, 1, 5, 2, 4]
    ragged = np.empty(rows, object)
    ragged[:] = [random.normal(size=length).astype("f4") for length in lengths]
    words = np.empty(rows, object)
    words[:] = [np.array(list("words"[: length + 1])) for length in lengths]
    columns = [
        fits.Column("first", "J", array=np.arange(rows)),
        fits.Column("ragged", "PE()", array=ragged),
        fits.Column("between", "12A", array=np.array([f"star {n}" for n in range(rows)])),
        fits.Column("long", "QE()", array=ragged),
        fits.Column("words", "PA()", array=words),
        fits.Column("triple", "3D", array=random.normal(size=(rows, 3))),
        fits.Column("square", "4I", dim="(2,2)", array=random.integers(0, 9, (rows, 2, 2))),
        fits.Column("complex", "C", array=random.normal(size=rows).astype("c8")),
        fits.Column("double complex", "M", array=random.normal(size=rows).astype("c16")),
        fits.Column("flags", "70X", array=random.random((rows, 70)) > 0.5),
        fits.Column("last", "D", array=random.normal(size=rows)),
    ]
    fits.BinTableHDU.from_columns(columns).writeto(path, overwrite=True)
    kept = ["first", "between", "last"]
    left_out = [column.name for column in columns if column.name not in kept]
    return {"columns": columns_of(Table.read(path, format="fits"), kept), "leftOut": left_out}


def ascii_table(path):
    rows = 40
    columns = [
        fits.Column("name", "A10", array=texts(rows, 10)),
        fits.Column("n", "I6", null="-999", array=random.integers(-1000, 1000, rows)),
        fits.Column("id", "I19", array=random.integers(2**61, 2**62, rows)),
        fits.Column("f", "F12.4", array=random.normal(0, 100, rows)),
        fits.Column("e", "E15.7", array=random.normal(size=rows) * 10.0 ** random.integers(-30, 30, rows)),
        fits.Column("d", "D25.17", array=random.normal(size=rows) * 10.0 ** random.integers(-90, 90, rows)),
    ]
    fits.TableHDU.from_columns(columns).writeto(path, overwrite=True)
    return {"columns": columns_of(Table.read(path, format="fits"))}


def several_parts(path):
    stars = fits.BinTableHDU(Table({"a": np.arange(5), "b": np.arange(5) / 7}), name="STARS")
    parts = [
        fits.PrimaryHDU(np.zeros((30, 40), "f4")),
        fits.ImageHDU(np.ones((5, 6, 7), "i2")),
        stars,
        fits.CompImageHDU(np.ones((50, 50), "i2")),
        fits.BinTableHDU(Table({"a": np.arange(7)}), name="ERRORS"),
    ]
    fits.HDUList(parts).writeto(path, overwrite=True, checksum=True)
    return {"columns": columns_of(Table.read(path, format="fits", hdu="STARS")), "others": ["ERRORS: 7 rows"]}


def described(path):
    """What FITS has no keywords for stands in comments."""
    table = Table({"a": np.arange(2), "b": np.arange(2.0)})
    table["a"].description = "A description that is much longer than one record of a header can hold, it's so"
    table["a"].info.meta = {"ucd": "meta.id;meta.main"}
    table["b"].description = "short"
    table["b"].unit = "mas / yr"
    return {
        "columns": write(table, path),
        "descriptions": [table[name].description for name in table.colnames],
        "ucds": ["meta.id;meta.main", ""],
    }


def long_header(path):
    """Texts longer than a record, quotes in them, and records of every kind."""
    table = Table({"a": np.arange(2)})
    hdu = fits.BinTableHDU(table, name="it's")
    hdu.header["REFERENC"] = "2099ApJ...123..456Q"
    hdu.header["EQUINOX"] = 2000.0
    hdu.header["RADESYS"] = "ICRS"
    hdu.header["TUCD1"] = "meta.id;" * 20 + "it's"
    hdu.header["TCOMM1"] = "a description of the column " * 8 + "& so on"
    hdu.header["HIERARCH long keyword"] = 1.5
    hdu.header.add_comment("words " * 40)
    hdu.header.add_history("made")
    hdu.writeto(path, overwrite=True)
    header = fits.getheader(path, 1)
    said = {
        "ucd": header["TUCD1"],
        "description": header["TCOMM1"],
        "title": header["EXTNAME"],
        "source": header["REFERENC"],
        "equinox": str(header["EQUINOX"]),
        "system": header["RADESYS"],
    }
    return {"columns": columns_of(Table.read(path, format="fits")), "header": said}


FILES = [
    types,
    no_rows,
    one_row,
    many_rows,
    many_columns,
    masked,
    masked_unsigned,
    unicode_texts,
    scaled,
    arrays,
    ascii_table,
    several_parts,
    described,
    long_header,
]

folder = json.load(sys.stdin)["folder"]
answers = {}
for file in FILES:
    path = os.path.join(folder, f"{file.__name__}.fits")
    answers[file.__name__] = {"path": path, **file(path)}
json.dump(answers, sys.stdout, allow_nan=False)
