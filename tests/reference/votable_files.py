"""VOTables that astropy writes into a folder, and what it reads from them: JSON in, JSON out, by name."""

import json
import os
import sys
import warnings

import numpy as np
from astropy.io.votable import parse
from astropy.io.votable.tree import Field, Resource, Table, VOTableFile

warnings.simplefilter("ignore")

FORMS = ["tabledata", "binary", "binary2"]
SCALARS = [
    ("id", "long", None),
    ("d", "double", None),
    ("f", "float", None),
    ("i", "int", None),
    ("s", "short", None),
    ("u", "unsignedByte", None),
    ("b", "boolean", None),
    ("t", "bit", None),
    ("letter", "char", None),
    ("fixed", "char", "6"),
    ("text", "char", "*"),
    ("some", "char", "9*"),
    ("wide", "unicodeChar", "*"),
    ("wide_fixed", "unicodeChar", "5"),
]
ARRAYS = [
    ("pair", "double", "2"),
    ("any", "int", "*"),
    ("upto", "float", "4*"),
    ("square", "short", "2x3"),
    ("bits", "bit", "11"),
    ("flags", "boolean", "3"),
    ("wave", "floatComplex", None),
    ("waves", "doubleComplex", "2"),
]
TEXTS = ["", "a", "R & D", "<x>", "5 > 3", " two ", '"q"', "TIC 1"]
WIDE = ["", "\u03b1 Cen", "\u00e9", "\u661f", "abc", "\u2212 5", "Z", "\u00b5m"]
NULLS = {"long": -9223372036854775808, "int": -2147483648, "short": -32768, "unsignedByte": 255}


def scalar(random, name, datatype, row):
    texts = {"letter": "xyz&<"[row % 5], "fixed": TEXTS[row % 8][:6], "text": TEXTS[row % 8] * (row % 3 + 1)}
    if name in texts:
        return texts[name]
    if name == "some":
        return TEXTS[(row + 3) % 8]
    if name == "wide":
        return WIDE[row % 8]
    if name == "wide_fixed":
        return WIDE[(row + 1) % 8][:5]
    if datatype == "double":
        return [random.normal() * 10.0 ** random.integers(-300, 300), np.nan, np.inf, -np.inf][row % 7 if row % 7 < 4 else 0]
    if datatype == "float":
        return np.float32(random.normal() * 10.0 ** random.integers(-30, 30)) if row % 6 else np.float32(np.nan)
    if datatype in ("boolean", "bit"):
        return bool(random.integers(0, 2))
    ranges = {"long": (-(2**63) + 1, 2**63 - 1), "int": (-(2**31) + 1, 2**31 - 1), "short": (-(2**15) + 1, 2**15 - 1)}
    low, high = ranges.get(datatype, (0, 254))
    return int(random.integers(low, high, endpoint=True))


def array(random, name):
    whole = {
        "pair": lambda: random.normal(size=2),
        "any": lambda: np.ma.array(random.integers(-99, 99, random.integers(0, 5)).astype("i4")),
        "upto": lambda: np.ma.array(random.normal(size=random.integers(0, 5)).astype("f4")),
        "square": lambda: random.integers(-99, 99, (3, 2)),
        "bits": lambda: random.integers(0, 2, 11).astype(bool),
        "flags": lambda: random.integers(0, 2, 3).astype(bool),
        "wave": lambda: complex(*random.normal(size=2)),
        "waves": lambda: random.normal(size=2) + 1j * random.normal(size=2),
    }
    value = whole[name]()
    if isinstance(value, np.ma.MaskedArray):  # astropy's writer wants a mask for each item
        value.mask = np.zeros(len(value), bool)
    return value


def document(fields, rows, version="1.4", masks=None, with_nulls=False):
    votable = VOTableFile(version=version)
    resource = Resource()
    votable.resources.append(resource)
    table = Table(votable, name="stars")
    resource.tables.append(table)
    for name, datatype, size in fields:
        field = Field(votable, name=name, ID=name, datatype=datatype, arraysize=size)
        if with_nulls and datatype in NULLS:
            field.values.null = NULLS[datatype]
        table.fields.append(field)
    table.create_arrays(len(rows))
    for row, values in enumerate(rows):
        table.array[row] = tuple(values)
        if masks is not None:
            table.array.mask[row] = tuple(masks[row])
    return votable


def spelled(value):
    """A cell with all its digits; None for a blank."""
    if value is np.ma.masked or value is None:
        return None
    if isinstance(value, bytes):
        value = value.decode()
    if isinstance(value, (bool, np.bool_)):
        return "true" if value else "false"
    if isinstance(value, (float, np.floating)):
        return None if np.isnan(value) else repr(float(value))
    return None if value == "" else str(value)


def written(folder, name, votable, form):
    path = os.path.join(folder, f"{name}.xml")
    votable.to_xml(path, tabledata_format=form)
    table = parse(path).get_first_table()
    kept = [field for field in table.fields if field.ID not in {name for name, _, _ in ARRAYS}]
    columns = [
        {"name": field.ID, "cells": [spelled(value) for value in table.array[field.ID]]} for field in kept
    ]
    return {"path": path, "form": form.upper(), "columns": columns}


def main():
    folder = json.load(sys.stdin)["folder"]
    random = np.random.default_rng(20260101)
    files = {}

    def add(name, form, *args, **kwargs):
        files[f"{name}_{form}"] = written(folder, f"{name}_{form}", document(*args, **kwargs), form)

    def scalars(count):
        return [[scalar(random, name, datatype, row) for name, datatype, _ in SCALARS] for row in range(count)]

    texts = {"char", "unicodeChar"}
    for form in FORMS:
        add("types", form, SCALARS, scalars(200))
        masks = [[random.random() < 0.4 for _ in SCALARS] for _ in range(100)]
        # Only BINARY2 and empty cells can leave any cell blank; BINARY has marks for whole numbers alone.
        if form == "binary":
            masks = [[m and field[1] in NULLS for m, field in zip(row, SCALARS)] for row in masks]
        add("masked", form, SCALARS, scalars(100), masks=masks, with_nulls=True)
        add("no_rows", form, SCALARS, [])
        add("one_row", form, SCALARS, scalars(1))
        wide = [(f"c{i}", "double" if i % 3 else "int", None) for i in range(3000)]
        add("many_columns", form, wide, [[row * 3000 + i for i in range(3000)] for row in range(3)])
        mixed = [pair for both in zip(SCALARS, ARRAYS) for pair in both]
        arrays = [
            [array(random, f[0]) if f in ARRAYS else scalar(random, f[0], f[1], row) for f in mixed]
            for row in range(40)
        ]
        add("arrays", form, mixed, arrays)
        if form != "binary2":
            add("old", form, SCALARS, scalars(30), version="1.2")
    answer = {"files": files, "arrays": [name for name, _, _ in ARRAYS]}
    json.dump(answer, sys.stdout)


main()
