/**
 * Constants, each with its source. Solar and planetary values are the nominal conversion constants of IAU 2015
 * Resolution B3 (Prša et al. 2016, AJ 152, 41): exact by convention. Planck's and Boltzmann's constants and the speed of
 * light are exact in the SI since 2019.
 */

/** Nominal solar radius, m (IAU 2015 B3). */
export const SOLAR_RADIUS_M = 6.957e8;
/** Nominal solar mass parameter (GM), m³ s⁻² (IAU 2015 B3). Used in place of G times a mass, as G is known to 22 ppm only. */
export const SOLAR_GM = 1.3271244e20;
/** Nominal solar effective temperature, K (IAU 2015 B3). */
export const SOLAR_TEFF_K = 5772;
/** Nominal solar luminosity, W (IAU 2015 B3). */
export const SOLAR_LUMINOSITY_W = 3.828e26;
/** Nominal total solar irradiance at 1 au, W m⁻² (IAU 2015 B3). */
export const SOLAR_IRRADIANCE = 1361;
/** Nominal equatorial radius of the Earth, m (IAU 2015 B3). */
export const EARTH_RADIUS_M = 6.3781e6;
/** Nominal polar radius of the Earth, m (IAU 2015 B3; from memory). */
export const EARTH_POLAR_RADIUS_M = 6.3568e6;
/** Nominal mass parameter of the Earth, m³ s⁻² (IAU 2015 B3). */
export const EARTH_GM = 3.986004e14;
/** Nominal equatorial radius of Jupiter, m (IAU 2015 B3). */
export const JUPITER_RADIUS_M = 7.1492e7;
/** Nominal polar radius of Jupiter, m (IAU 2015 B3; from memory). */
export const JUPITER_POLAR_RADIUS_M = 6.6854e7;
/** Nominal mass parameter of Jupiter, m³ s⁻² (IAU 2015 B3). */
export const JUPITER_GM = 1.2668653e17;
/** Astronomical unit, m (IAU 2012 B2). */
export const AU_M = 149_597_870_700;
/** Parsec, m: 648000 / π au (IAU 2015 B2, note 4). */
export const PARSEC_M = (648_000 / Math.PI) * AU_M;
/** Luminosity of absolute bolometric magnitude 0, W (IAU 2015 B2). */
export const ZERO_LUMINOSITY_W = 3.0128e28;
/** Flux of apparent bolometric magnitude 0, W m⁻²: that luminosity at 10 pc, 2.518021002e-8 (IAU 2015 B2). */
export const ZERO_FLUX = ZERO_LUMINOSITY_W / (4 * Math.PI * (10 * PARSEC_M) ** 2);
/** Absolute bolometric magnitude of the Sun (IAU 2015 B2: −2.5 log(L☉ / 3.0128e28 W) = 4.739996). */
export const SOLAR_MBOL = 4.74;
/** Seconds in a day. */
export const DAY_S = 86_400;
/** Speed of light, m s⁻¹ (SI, exact). */
export const SPEED_OF_LIGHT = 299_792_458;
/** Planck's constant, J s (SI, exact). */
export const PLANCK_CONSTANT = 6.626_070_15e-34;
/** Boltzmann's constant, J K⁻¹ (SI, exact). */
export const BOLTZMANN_CONSTANT = 1.380_649e-23;
/** Stefan–Boltzmann constant, W m⁻² K⁻⁴: 2 π⁵ k⁴ / (15 h³ c²) = 5.670374419184429e-8. */
export const STEFAN_BOLTZMANN =
  (2 * Math.PI ** 5 * BOLTZMANN_CONSTANT ** 4) / (15 * PLANCK_CONSTANT ** 3 * SPEED_OF_LIGHT ** 2);
/** Gravitational constant, m³ kg⁻¹ s⁻² (CODATA 2018 and 2022), known to 22 ppm: for display alone, never times a mass. */
export const GRAVITATIONAL_CONSTANT = 6.6743e-11;

/** Astronomical units in solar radii: 215.03215567. */
export const AU_PER_SOLAR_RADIUS = AU_M / SOLAR_RADIUS_M;
/** Earth radii in a solar radius: 109.0764. */
export const EARTH_RADII_PER_SOLAR = SOLAR_RADIUS_M / EARTH_RADIUS_M;
/** Period of a massless planet at 1 au from one nominal solar mass, days: 365.2568984 (the Gaussian year, not 365.25). */
export const GAUSSIAN_YEAR_D = (2 * Math.PI * Math.sqrt(AU_M ** 3 / SOLAR_GM)) / DAY_S;
/** Surface gravity of the Sun, log of cm s⁻²: 4.438067627. */
export const SOLAR_LOGG = Math.log10((100 * SOLAR_GM) / SOLAR_RADIUS_M ** 2);
/** Mean density of the Sun, g cm⁻³: 1.40977982. The one place where G cannot be avoided. */
export const SOLAR_DENSITY =
  SOLAR_GM / GRAVITATIONAL_CONSTANT / ((4 / 3) * Math.PI * SOLAR_RADIUS_M ** 3) / 1000;
