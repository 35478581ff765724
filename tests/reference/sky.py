"""What astropy makes of the rows that inputs.ts writes: JSON in, JSON out, by subject."""

import json
import sys

import numpy as np
from astropy import units as u
from astropy.constants import iau2015
from astropy.coordinates import Distance
from astropy.utils import iers

# The tables that come with the package have to do: a test asks nobody on the network.
iers.conf.auto_download = False
iers.conf.iers_degraded_accuracy = "ignore"


def constants(rows):
    """R_sun, GM_sun, R_earth, R_jup, au (SI units), M_bol of the Sun, au in R_sun."""
    sun = iau2015
    values = [sun.R_sun.si.value, sun.GM_sun.si.value, sun.R_earth.si.value, sun.R_jup.si.value]
    bolometric = -2.5 * np.log10(sun.L_sun.si.value / iau2015.L_bol0.si.value)
    return [values + [u.au.to(u.m), bolometric, u.au.to(u.m) / sun.R_sun.si.value]]


def distances(rows):
    """Distance in pc, distance modulus in mag, of a parallax in mas."""
    distance = Distance(parallax=rows[:, 0] * u.mas)
    return np.column_stack([distance.pc, distance.distmod.value])


SUBJECTS = [constants, distances]


def main():
    tables = json.load(sys.stdin)
    answers = {}
    for subject in SUBJECTS:
        answers[subject.__name__] = np.asarray(subject(np.array(tables[subject.__name__]))).tolist()
    json.dump(answers, sys.stdout, allow_nan=False)


if __name__ == "__main__":
    main()
