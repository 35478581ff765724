"""What astropy makes of the rows that inputs.ts writes: JSON in, JSON out, by subject."""

import json
import sys

import erfa
import numpy as np
from astropy import units as u
from astropy.constants import codata2018, iau2015
from astropy.coordinates import (
    AltAz,
    BarycentricMeanEcliptic,
    Distance,
    EarthLocation,
    SkyCoord,
    get_body,
    get_sun,
)
from astropy.time import Time
from astropy.utils import iers
from astropy_healpix import HEALPix

# The tables that come with the package have to do: a test asks nobody on the network.
iers.conf.auto_download = False
iers.conf.iers_degraded_accuracy = "ignore"


def constants(rows):
    """The nominal constants of IAU 2015, then those of CODATA 2018, in SI units; last, M_bol of the Sun."""
    nominal = [
        getattr(iau2015, name)
        for name in "R_sun GM_sun L_sun R_earth GM_earth R_jup GM_jup au pc L_bol0".split()
    ]
    measured = [getattr(codata2018, name) for name in "c h k_B sigma_sb G".split()]
    bolometric = -2.5 * np.log10(iau2015.L_sun / iau2015.L_bol0).value
    return [[constant.si.value for constant in nominal + measured] + [bolometric]]


def distances(rows):
    """Distance in pc, distance modulus in mag, of a parallax in mas."""
    distance = Distance(parallax=rows[:, 0] * u.mas)
    return np.column_stack([distance.pc, distance.distmod.value])


def epochs(rows):
    """Julian date of a Besselian epoch."""
    return Time(rows[:, 0], format="byear", scale="tt").jd[:, np.newaxis]


def motions(rows):
    """Right ascension, declination, parallax, both motions, radial velocity: at the later epoch, with light-time."""
    ra, dec, parallax, motion_ra, motion_dec, velocity, years = rows.T
    stars = SkyCoord(
        ra * u.deg,
        dec * u.deg,
        distance=Distance(parallax=parallax * u.mas),
        pm_ra_cosdec=motion_ra * u.mas / u.yr,
        pm_dec=motion_dec * u.mas / u.yr,
        radial_velocity=velocity * u.km / u.s,
    )
    later = stars.apply_space_motion(dt=years * u.yr)
    return np.column_stack(
        [
            later.ra.deg,
            later.dec.deg,
            later.distance.to_value(u.mas, u.parallax()),
            later.pm_ra_cosdec.to_value(u.mas / u.yr),
            later.pm_dec.to_value(u.mas / u.yr),
            later.radial_velocity.to_value(u.km / u.s),
        ]
    )


def icrs(rows):
    return SkyCoord(rows[:, 0] * u.deg, rows[:, 1] * u.deg)


def galactic(rows):
    """Longitude and latitude of the frame, which comes by way of FK5; the same by the Hipparcos matrix."""
    frame = icrs(rows).galactic
    longitude, latitude = erfa.icrs2g(np.radians(rows[:, 0]), np.radians(rows[:, 1]))
    return np.column_stack([frame.l.deg, frame.b.deg, np.degrees(longitude), np.degrees(latitude)])


def ecliptic(rows):
    """Longitude and latitude for the mean ecliptic of J2000.0, with the frame bias."""
    frame = icrs(rows).transform_to(BarycentricMeanEcliptic(equinox="J2000"))
    return np.column_stack([frame.lon.deg, frame.lat.deg])


def precession(rows):
    """Right ascension and declination for the mean equator of date, with the frame bias; general precession, degrees."""
    ra, dec, date = rows.T
    matrices = erfa.pmat06(date, 0.0)
    vectors = erfa.s2c(np.radians(ra), np.radians(dec))
    ra_of_date, dec_of_date = erfa.c2s(np.einsum("nij,nj->ni", matrices, vectors))
    general = erfa.p06e(date, 0.0)[12]
    return np.degrees(np.column_stack([erfa.anp(ra_of_date), dec_of_date, general]))


def obliquity(rows):
    """Mean obliquity of date, degrees."""
    return np.degrees(erfa.obl06(rows[:, 0], 0.0))[:, np.newaxis]


def pairs(rows):
    """Separation and position angle, degrees."""
    first, second = icrs(rows[:, :2]), icrs(rows[:, 2:])
    return np.column_stack([first.separation(second).deg, first.position_angle(second).deg])


def altitudes(rows):
    """Altitude and azimuth without refraction, degrees."""
    place = EarthLocation.from_geodetic(rows[:, 4] * u.deg, rows[:, 3] * u.deg, 0 * u.m)
    frame = AltAz(obstime=Time(rows[:, 2], format="jd", scale="utc"), location=place)
    seen = icrs(rows).transform_to(frame)
    return np.column_stack([seen.alt.deg, seen.az.deg])


def sidereal(rows):
    """Mean sidereal time by IAU 1982 and by IAU 2006, Earth rotation angle; degrees."""
    date = rows[:, 0]
    mean = erfa.gmst82(date, 0.0), erfa.gmst06(date, 0.0, date, 69.0 / 86400)
    return np.degrees(np.column_stack([*mean, erfa.era00(date, 0.0)]))


def sun(rows):
    """Right ascension, declination (degrees), distance (au): geocentric, on the axes of the ICRS."""
    body = get_sun(Time(rows[:, 0], format="jd", scale="tt"))
    return np.column_stack([body.ra.deg, body.dec.deg, body.distance.au])


def moon(rows):
    """Right ascension, declination, parallax, elongation from the Sun; degrees, geocentric, on the axes of the ICRS."""
    time = Time(rows[:, 0], format="jd", scale="tt")
    body, light = get_body("moon", time), get_sun(time)
    parallax = np.degrees(np.arcsin(6378.137 / body.distance.km))
    elongation = np.degrees(erfa.seps(body.ra.rad, body.dec.rad, light.ra.rad, light.dec.rad))
    return np.column_stack([body.ra.deg, body.dec.deg, parallax, elongation])


def pixels(rows):
    """Nested index, ring index."""
    answers = []
    for order, longitude, latitude in rows:
        place = longitude * u.deg, latitude * u.deg
        side = 2 ** int(order)
        answers.append([float(HEALPix(side, order=name).lonlat_to_healpix(*place)) for name in ("nested", "ring")])
    return answers


def neighbours(rows):
    """Nested indices of the eight neighbours; -1 for one that is not there."""
    return [HEALPix(2 ** int(order), order="nested").neighbours(int(pixel)).astype(float) for order, pixel in rows]


SUBJECTS = [
    constants,
    distances,
    epochs,
    motions,
    galactic,
    ecliptic,
    precession,
    obliquity,
    pairs,
    altitudes,
    sidereal,
    sun,
    moon,
    pixels,
    neighbours,
]


def main():
    tables = json.load(sys.stdin)
    answers = {}
    for subject in SUBJECTS:
        answers[subject.__name__] = np.asarray(subject(np.array(tables[subject.__name__]))).tolist()
    json.dump(answers, sys.stdout, allow_nan=False)


if __name__ == "__main__":
    main()
