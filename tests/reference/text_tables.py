"""Text tables that astropy writes, with what it reads from them itself: JSON in, JSON out."""

import io
import json
import os
import sys
import tempfile
import warnings

import numpy as np
from astropy import units as u
from astropy.coordinates import SkyCoord
from astropy.io import ascii
from astropy.table import Column, MaskedColumn, Table

WRITERS = {
    "basic": {},
    "commented_header": {},
    "csv": {},
    "csv, semicolons": {"format": "csv", "delimiter": ";"},
    "basic, bars": {"format": "basic", "delimiter": "|"},
    "tab": {},
    "fixed_width": {},
    "fixed_width, bars without padding": {"format": "fixed_width", "delimiter_pad": None},
    "fixed_width, no bookend": {"format": "fixed_width", "bookend": False},
    "fixed_width, blanks": {"format": "fixed_width", "bookend": False, "delimiter": None, "delimiter_pad": "  "},
    "fixed_width_two_line": {},
    "rst": {},
    "ipac": {},
    "mrt": {},
}


def cell(value):
    """A value with all its digits; None for a blank."""
    if value is np.ma.masked or isinstance(value, np.ma.core.MaskedConstant):
        return None
    if isinstance(value, (float, np.floating)):
        return None if np.isnan(value) else repr(float(value))
    text = str(value)
    return None if text == "" else text


def numbers():
    random = np.random.default_rng(20310211)
    count = 60
    table = Table()
    table["id"] = 3141592653589793239 + np.arange(count)
    table["name"] = [f"LH-{i:04d}" for i in range(count)]
    table["plx"] = np.round(random.uniform(1, 500, count), 4)
    table["tiny"] = random.normal(size=count) * 1e-9
    table["count"] = random.integers(-5, 2000, count)
    return table


def words():
    table = numbers()
    table["words"] = [f"Proxima {i} b" if i % 3 else "one" for i in range(len(table))]
    return table


def blanks():
    table = Table(numbers(), masked=True)
    for at, name in enumerate(["plx", "tiny", "count"]):
        table[name].mask = (np.arange(len(table)) + at) % 4 == 0
    return table


def foreign():
    table = numbers()
    table["name"] = [f"Étoile{i}" if i % 2 else f"α{i}" for i in range(len(table))]
    return table


def described():
    table = numbers()
    table["plx"].unit = u.mas
    table["plx"].description = "Parallax"
    table["count"].unit = u.ct
    return table


def tables():
    plain = numbers()
    return {
        "numbers": plain,
        "words": words(),
        "blanks": blanks(),
        "letters": foreign(),
        "units": described(),
        "one row": plain[:1],
        "no rows": plain[:0],
    }


def columns_of(table):
    return [
        {
            "name": name,
            "unit": "" if table[name].unit is None else str(table[name].unit),
            "isNumber": table[name].dtype.kind in "iuf",
            "cells": [cell(value) for value in table[name]],
        }
        for name in table.colnames
    ]


def written():
    files = {}
    for writer, options in WRITERS.items():
        options = dict(options)
        form = options.pop("format", writer)
        for kind, table in tables().items():
            text = io.StringIO()
            try:
                ascii.write(table, text, format=form, **options)
            except Exception as error:
                files[f"{writer}: {kind}"] = {"failure": str(error)}
                continue
            files[f"{writer}: {kind}"] = {"text": text.getvalue(), "columns": columns_of(table)}
    return files


def positions():
    """A table with sexagesimal positions in parts, and where its stars are."""
    random = np.random.default_rng(7)
    count = 50
    ra = random.uniform(0, 360, count)
    dec = random.uniform(-90, 90, count)
    # This version writes -00 degrees without their sign.
    dec[np.abs(dec) < 1] += 2
    table = Table({"name": [f"S{i}" for i in range(count)]})
    table["coord"] = SkyCoord(ra * u.deg, dec * u.deg, frame="icrs")
    text = io.StringIO()
    ascii.write(table, text, format="mrt")
    return {"text": text.getvalue(), "ra": list(ra), "dec": list(dec)}


def read(readme, data):
    """What astropy makes of a description and the table that belongs to it."""
    with tempfile.TemporaryDirectory() as folder:
        names = [os.path.join(folder, name) for name in ["ReadMe", "table1.dat"]]
        for name, text in zip(names, [readme, data]):
            with open(name, "w", encoding="utf-8") as file:
                file.write(text)
        return columns_of(ascii.read(names[1], format="cds", readme=names[0]))


if __name__ == "__main__":
    warnings.simplefilter("ignore")
    given = json.load(sys.stdin)
    answers = {"written": written(), "positions": positions(), "read": read(given["readme"], given["data"])}
    json.dump(answers, sys.stdout)
