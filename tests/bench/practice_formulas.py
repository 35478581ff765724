"""The practice formulas in numpy, timed from typed arrays to typed arrays: the yardstick of tests/bench/formulas.bench.ts."""

import json
import sys
import time

import numpy as np

AU_PER_SOLAR_RADIUS = 149_597_870_700 / 6.957e8
EARTH_RADII_PER_SOLAR = 6.957e8 / 6.3781e6
YEAR_D = 2 * np.pi * np.sqrt(149_597_870_700.0**3 / 1.3271244e20) / 86_400


def insolation(t, s, a, b, c, d):
    return s + t * (a + t * (b + t * (c + t * d)))


def period(axis, mass):
    return YEAR_D * np.sqrt(axis * axis * axis / mass)


def formulas(parallax, ks, teff, magnitude):
    abs_ks = ks + 5 - 5 * np.log10(1000 / parallax)
    in_range = (abs_ks >= 4.6) & (abs_ks <= 9.8)
    radius = np.where(in_range, 1.9515 + abs_ks * (-0.352 + 0.0168 * abs_ks), np.nan)
    x = abs_ks - 7.5
    power = -0.642 + x * (-0.208 + x * (-8.43e-4 + x * (7.87e-3 + x * (1.42e-4 - 2.13e-4 * x))))
    mass = np.where(in_range, 10**power, np.nan)
    luminosity = radius * radius * (teff / 5772) ** 4
    t = teff - 5780
    is_zone = (teff >= 2600) & (teff <= 7200)
    runaway = insolation(t, 1.107, 1.332e-4, 1.58e-8, -8.308e-12, -1.931e-15)
    maximum = insolation(t, 0.356, 6.171e-5, 1.698e-9, -3.198e-12, -5.575e-16)
    inner = np.sqrt(luminosity / np.where(is_zone, runaway, np.nan))
    outer = np.sqrt(luminosity / np.where(is_zone, maximum, np.nan))
    earth = np.sqrt(luminosity)
    earth_period = period(earth, mass)
    a = earth * AU_PER_SOLAR_RADIUS / radius
    probability = np.where(a > 1, 1 / a, np.nan)
    duration = 24 * earth_period / np.pi * np.arcsin(1 / a)
    step = magnitude - 10
    noise = np.sqrt((90 * 10 ** (0.2 * step)) ** 2 + (12 * 10 ** (0.4 * step)) ** 2 + 25.0**2)
    noise = np.where((magnitude >= 7) & (magnitude <= 14.5), noise, np.nan)
    transits = np.floor(180 * 0.9 / earth_period)
    r_min = EARTH_RADII_PER_SOLAR * radius * np.sqrt(7.1 * noise * 1e-6 / np.sqrt(transits * duration))
    return (
        abs_ks, radius, mass, luminosity, inner, outer, period(inner, mass), period(outer, mass),
        earth, earth_period, probability, duration, noise, transits, r_min,
    )


def main():
    rows, rounds = int(sys.argv[1]), int(sys.argv[2])
    i = np.arange(rows, dtype=np.float64)
    share = (i * 7919 % rows) / rows
    parallax = 20 + 60 * share
    ks = 8 + 5 * np.log10(100 / parallax) + 3 * ((i % 1000) / 1000 - 0.5)
    columns = (parallax, ks, 2700 + 1200 * share, 8 + 6 * share)
    times = []
    with np.errstate(all="ignore"):
        formulas(*columns)
        for _ in range(rounds):
            began = time.perf_counter()
            results = formulas(*columns)
            times.append(1000 * (time.perf_counter() - began))
    sums = [float(np.nansum(result)) for result in results]
    json.dump({"ms": sorted(times)[rounds // 2], "sums": sums}, sys.stdout)


main()
