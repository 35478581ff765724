"""What astropy writes as ECSV and what it reads from ours: JSON in, JSON out."""

import io
import json
import sys

import numpy as np
from astropy import units as u
from astropy.table import Column, MaskedColumn, Table

WHOLE = ["int8", "int16", "int32", "int64", "uint8", "uint16", "uint32", "uint64"]
REAL = ["float16", "float32", "float64"]


def cell(value):
    """A value with all its digits; None for a blank."""
    if value is np.ma.masked or (isinstance(value, np.ma.core.MaskedConstant)):
        return None
    if isinstance(value, (bool, np.bool_)):
        return "true" if value else "false"
    if isinstance(value, (float, np.floating)):
        return None if np.isnan(value) else repr(float(value))
    text = str(value)
    return None if text == "" else text


def columns_of(table):
    return [
        {
            "name": name,
            "unit": str(table[name].unit or ""),
            "description": table[name].description or "",
            "ucd": table[name].meta.get("ucd", ""),
            "cells": [cell(value) for value in table[name]],
        }
        for name in table.colnames
    ]


def of_every_type():
    table = Table()
    for name in WHOLE:
        info = np.iinfo(name)
        table[name] = np.array([info.min, 0, info.max], dtype=name)
    for name in REAL:
        info = np.finfo(name)
        table[name] = np.array([info.max, -info.tiny, 0.1], dtype=name)
    table["not_finite"] = np.array([np.nan, np.inf, -np.inf])
    table["bool"] = np.array([True, False, True])
    table["text"] = ["a b", 'q"uo"te, and comma', "x"]
    table["unicode"] = ["é☉", "Ω Centauri", "北"]
    table["lines"] = ["one\ntwo", "c", "d"]
    return table


def with_blanks():
    table = Table()
    mask = [False, True, False]
    for name in WHOLE + REAL:
        table[name] = MaskedColumn(np.array([1, 2, 3], dtype=name), mask=mask)
    table["bool"] = MaskedColumn([True, False, True], mask=mask)
    table["text"] = MaskedColumn(["a", "b", "c"], mask=mask)
    table["all"] = MaskedColumn([1.0, 2.0, 3.0], mask=[True, True, True])
    return table


def with_units():
    table = Table(meta={"title": "Stars: near", "comments": ["one", "two"]})
    table["pmra"] = Column([1.5, -2.0], unit=u.mas / u.yr, description='In "RA": é', meta={"ucd": "pos.pm;pos.eq.ra"})
    table["logg"] = Column([4.5, 5.0], unit="dex(cm s-2)", meta={"ucd": "phys.gravity"})
    table["id"] = Column(np.array([3141592653589793239, -1]), description="- [x]: #")
    return table


def tables():
    every = of_every_type()
    return {
        "every type": every,
        "blanks": with_blanks(),
        "units": with_units(),
        "no rows": every[:0],
        "one row": every[:1],
        "one column": Table({"only": ["x", "", "z"]}),
    }


def written():
    answers = {}
    for name, table in tables().items():
        for delimiter, word in [(" ", "blanks"), (",", "commas")]:
            for how in ["null_value", "data_mask"]:
                text = io.StringIO()
                table.write(text, format="ascii.ecsv", delimiter=delimiter, serialize_method=how)
                read = Table.read(text.getvalue(), format="ascii.ecsv")
                key = f"{name}, {word}, {how}"
                answers[key] = {"text": text.getvalue(), "columns": columns_of(read)}
    return answers


def read(text):
    table = Table.read(text, format="ascii.ecsv")
    unknown = [
        name for name in table.colnames if isinstance(table[name].unit, u.UnrecognizedUnit)
    ]
    # A unit is understood when it converts to what it should be.
    factors = {
        "parallax": [u.arcsec, 1e-3],
        "pmra": [u.arcsec / u.yr, 1e-3],
        "radius": [u.m, u.solRad.to(u.m)],
        "mass": [u.kg, u.solMass.to(u.kg)],
        "luminosity": [u.W, u.solLum.to(u.W)],
        "hz_inner": [u.m, u.au.to(u.m)],
        "earth_period": [u.s, 86400],
        "transit_duration": [u.s, 3600],
        "r_min": [u.m, u.earthRad.to(u.m)],
        "distance": [u.m, u.pc.to(u.m)],
        "teff": [u.K, 1],
    }
    ratios = {name: table[name].unit.to(unit) / factor for name, (unit, factor) in factors.items()}
    return {"columns": columns_of(table), "unknown": unknown, "ratios": ratios, "meta": dict(table.meta)}


if __name__ == "__main__":
    json.dump({"written": written(), "read": read(json.load(sys.stdin)["ours"])}, sys.stdout)
