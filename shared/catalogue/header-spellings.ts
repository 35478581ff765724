import { type Column, columnsOf, errorKey } from "./columns.ts";

/** What a column of a file can mean: a given quantity, the temperature, the distance, or the error of one of them. */
export interface Meaning {
  readonly key: string;
  readonly label: string;
  /** Canonical unit. */
  readonly unit: string;
  readonly kind: "text" | "number";
}

/** Not used: the column stays in the original and nowhere else. */
export const KEPT = "kept";

const meaningsOf = (c: Column): Meaning[] => {
  const value: Meaning = {
    key: c.key,
    label: c.label,
    unit: c.unit,
    kind: c.kind === "text" ? "text" : "number",
  };
  const error: Meaning = { key: errorKey(c.key), label: `${c.label}, error`, unit: c.unit, kind: "number" };
  return c.hasError ? [value, error] : [value];
};

/** In the order in which forms offer them. */
export const MEANINGS: readonly Meaning[] = [
  ...columnsOf("given").flatMap(meaningsOf),
  ...columnsOf("stellar")
    .filter((c) => c.key === "teff" || c.key === "distance")
    .flatMap(meaningsOf),
];

const byKey = new Map(MEANINGS.map((m) => [m.key, m]));
export const findMeaning = (key: string): Meaning | undefined => byKey.get(key);

/** Header spellings in use, by what they mean; compared without case, blanks and punctuation. */
const SPELLINGS: Readonly<Record<string, string>> = {
  designation: "designation name star star_name object object_name main_id target id_name",
  source_id:
    "source_id sourceid source identifier id gaia_id gaia_source_id gaia_dr3_source_id gaiadr3 dr3_source_id star_id catalogue_id tic ticid kic epic",
  release: "release data_release catalogue_release",
  ra: "ra ra_deg radeg raj2000 _raj2000 ra_icrs ra_j2000 alpha right_ascension rightascension raicrs",
  dec: "dec dec_deg decdeg de dej2000 _dej2000 de_icrs dec_icrs dec_j2000 decj2000 delta declination dedeg",
  epoch: "ref_epoch epoch refepoch pos_epoch position_epoch reference_epoch epoch_yr",
  pmra: "pmra pm_ra pmracosdec pm_ra_cosdec pmra_cosd mu_alpha mualpha pmalpha pmra* pm_alpha",
  pmra_err: "pmra_error e_pmra pmra_err epmra pm_ra_error sigma_pmra pmraerr e_pm_ra pmra_unc",
  pmdec: "pmdec pm_dec pmde pm_de mu_delta mudelta pmdelta",
  pmdec_err: "pmdec_error e_pmdec e_pmde pmdec_err epmdec epmde pm_dec_error sigma_pmdec pmdecerr pmdec_unc",
  parallax: "parallax plx par pi varpi parallax_mas prlx",
  parallax_err:
    "parallax_error e_plx eplx plx_error e_parallax parallax_err sigma_parallax plx_err plxerr parallax_unc",
  g_mag: "phot_g_mean_mag gmag g_mag gaiamag g phot_g gaia_g",
  g_mag_err: "phot_g_mean_mag_error e_gmag egmag g_mag_err gmag_err e_g_mag g_err",
  bp_mag: "phot_bp_mean_mag bpmag bp_mag bp phot_bp gaiabp gaia_bp",
  bp_mag_err: "phot_bp_mean_mag_error e_bpmag bp_mag_err ebpmag bp_err",
  rp_mag: "phot_rp_mean_mag rpmag rp_mag rp phot_rp gaiarp gaia_rp",
  rp_mag_err: "phot_rp_mean_mag_error e_rpmag rp_mag_err erpmag rp_err",
  v_mag: "vmag v_mag v vtmag johnson_v mag_v",
  v_mag_err: "e_vmag v_mag_err evmag vmag_err vmag_error v_mag_error v_err",
  j_mag: "jmag j_mag j j_m mag_j j2mass tmass_j",
  j_mag_err: "e_jmag j_mag_err ejmag jmag_err j_msigcom e_j j_cmsig j_mag_error jmag_error",
  h_mag: "hmag h_mag h h_m mag_h h2mass tmass_h",
  h_mag_err: "e_hmag h_mag_err ehmag hmag_err h_msigcom e_h h_cmsig h_mag_error hmag_error",
  ks_mag: "ks_mag kmag k_mag ksmag ks k k_m ks_m mag_ks mag_k k2mass tmass_k",
  ks_mag_err:
    "ks_mag_err e_kmag e_ksmag ekmag kmag_err k_msigcom ks_msigcom e_ks e_k ks_cmsig k_cmsig ks_mag_error kmag_error ksmag_error ks_err ks_error",
  card_mag: "card_mag instrument_mag instrument_magnitude tmag t_mag passband_mag m_card",
  card_mag_err: "card_mag_err instrument_mag_err e_tmag card_mag_error instrument_mag_error",
  logg: "logg log_g logg_gspphot log(g) surface_gravity gravity",
  logg_err: "logg_err e_logg logg_error elogg e_log_g log_g_err logg_unc",
  feh: "feh fe_h [fe/h] mh m_h [m/h] mh_gspphot metallicity met",
  feh_err: "feh_err e_feh e_fe_h e_[fe/h] e_mh feh_error mh_err e_[m/h] efeh feh_unc",
  ruwe: "ruwe",
  light_share: "light_share lightshare contamination_share target_fraction flux_fraction",
  teff: "teff t_eff teff_gspphot teffective temperature effective_temperature teff_k",
  distance: "distance dist distance_pc dist_pc r_est rgeo",
  distance_err: "distance_err e_distance distance_error dist_err e_dist dist_error",
  ebv: "ebv e(b-v) e_b_v color_excess colour_excess reddening",
  ebv_err: "ebv_err e_ebv ebv_error e_e(b-v)",
  teff_err: "teff_err e_teff teff_error eteff teff_unc sigma_teff",
};

/** `pmRA*` keeps its meaning, `e_Ks` its error; blanks, brackets and case count for nothing. */
export const plainHeader = (header: string): string => header.toLowerCase().replace(/[^a-z0-9]+/g, "");

interface Spelling {
  readonly spelling: string;
  readonly key: string;
  /** Place among the spellings of its meaning: the lower, the surer. */
  readonly rank: number;
}

/** Each spelling with its meaning, also for a search by likeness. */
export const HEADER_SPELLINGS: readonly Spelling[] = Object.entries(SPELLINGS).flatMap(([key, list]) =>
  list.split(" ").map((spelling, rank) => ({ spelling: plainHeader(spelling), key, rank })),
);

const exact = new Map<string, Spelling>();
for (const s of HEADER_SPELLINGS) if (!exact.has(s.spelling)) exact.set(s.spelling, s);

/** The error of the colour B − V, which without its signs reads like the colour excess E(B − V). */
const COLOUR_ERROR = /^e_b[^a-z0-9]?v/i;

/** What a header spelled like that means, where the spelling is one in use. */
export const meaningOfHeader = (header: string): Spelling | undefined =>
  COLOUR_ERROR.test(header.trim()) ? undefined : exact.get(plainHeader(header));
