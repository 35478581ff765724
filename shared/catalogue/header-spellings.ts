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
  designation:
    "designation name star star_name object object_name main_id target id_name hip_name common_name star_id_name sname obj starname primary_name main_name designation_2mass hd_name",
  source_id:
    "source_id sourceid source identifier id gaia_id gaia_source_id gaia_dr3_source_id gaiadr3 dr3_source_id star_id catalogue_id tic ticid kic epic gaia_dr2_source_id dr2_source_id gaiaedr3 edr3_source_id gaia_source sourceid_dr3 gaia_dr3 dr3name objid obj_id object_id catalog_id cat_id catid gaiaid gaia_dr3_id sourcename",
  release: "release data_release catalogue_release",
  ra: "ra ra_deg radeg raj2000 _raj2000 ra_icrs ra_j2000 alpha right_ascension rightascension raicrs alpha_j2000 ra2000 radegrees alpha_2000 ra_deg_icrs ra_epoch2000 ra_hours ra_h rahms ra_hms radecimal ra_2000 rightasc",
  dec: "dec dec_deg decdeg de dej2000 _dej2000 de_icrs dec_icrs dec_j2000 decj2000 delta declination dedeg delta_j2000 dec2000 decdegrees delta_2000 dec_deg_icrs dec_epoch2000 dedms dec_dms dec_2000 decdecimal declin decl",
  epoch:
    "ref_epoch epoch refepoch pos_epoch position_epoch reference_epoch epoch_yr ep epochra ep_ra obs_epoch mean_epoch epochyr ref_ep epoch_ref jyear",
  pmra: "pmra pm_ra pmracosdec pm_ra_cosdec pmra_cosd mu_alpha mualpha pmalpha pmra* pm_alpha pmracosde pmra_cosdec pm_racosdec mu_ra mu_a mua pmra_cosde mu_alpha_star mualphastar mu_racosdec pm_alpha_cosdelta mu_alpha_cos_delta pm_racosd pmracosdelta muracosd propermotionra proper_motion_ra pmra_masyr",
  pmra_err: "pmra_error e_pmra pmra_err epmra pm_ra_error sigma_pmra pmraerr e_pm_ra pmra_unc",
  pmdec:
    "pmdec pm_dec pmde pm_de mu_delta mudelta pmdelta mu_dec mu_d mud mudec pm_delta propermotiondec proper_motion_dec pmdec_masyr pm_d",
  pmdec_err: "pmdec_error e_pmdec e_pmde pmdec_err epmdec epmde pm_dec_error sigma_pmdec pmdecerr pmdec_unc",
  parallax:
    "parallax plx par pi varpi parallax_mas prlx plx_mas trigonometric_parallax trig_plx parallax_dr3 gaia_parallax plx_value pi_trig absplx",
  parallax_err:
    "parallax_error e_plx eplx plx_error e_parallax parallax_err sigma_parallax plx_err plxerr parallax_unc",
  g_mag:
    "phot_g_mean_mag gmag g_mag gaiamag g phot_g gaia_g gaiagmag g_gaia gmag_gaia mag_g gaia_gmag gaia_g_mag g_mean_mag phot_g_mean g_dr3",
  g_mag_err: "phot_g_mean_mag_error e_gmag egmag g_mag_err gmag_err e_g_mag g_err",
  bp_mag:
    "phot_bp_mean_mag bpmag bp_mag bp phot_bp gaiabp gaia_bp bp_gaia gaia_bp_mag gaiabpmag mag_bp gbp gbpmag g_bp bp_mean_mag phot_bp_mean",
  bp_mag_err: "phot_bp_mean_mag_error e_bpmag bp_mag_err ebpmag bp_err",
  rp_mag:
    "phot_rp_mean_mag rpmag rp_mag rp phot_rp gaiarp gaia_rp rp_gaia gaia_rp_mag gaiarpmag mag_rp grp grpmag g_rp rp_mean_mag phot_rp_mean",
  rp_mag_err: "phot_rp_mean_mag_error e_rpmag rp_mag_err erpmag rp_err",
  v_mag:
    "vmag v_mag v vtmag johnson_v mag_v vjmag v_johnson vjohnson johnsonv visual_mag vmagnitude apass_v v_apass",
  v_mag_err: "e_vmag v_mag_err evmag vmag_err vmag_error v_mag_error v_err",
  j_mag:
    "jmag j_mag j j_m mag_j j2mass tmass_j jmag_2mass j_2mass tmass_jmag jtmass 2mass_j jmagnitude twomass_j j2m",
  j_mag_err: "e_jmag j_mag_err ejmag jmag_err j_msigcom e_j j_cmsig j_mag_error jmag_error",
  h_mag:
    "hmag h_mag h h_m mag_h h2mass tmass_h hmag_2mass h_2mass tmass_hmag htmass 2mass_h hmagnitude twomass_h h2m",
  h_mag_err: "e_hmag h_mag_err ehmag hmag_err h_msigcom e_h h_cmsig h_mag_error hmag_error",
  ks_mag:
    "ks_mag kmag k_mag ksmag ks k k_m ks_m mag_ks mag_k k2mass tmass_k kmag_2mass k_2mass ks_2mass ksmag_2mass tmass_kmag tmass_ks ktmass 2mass_k 2mass_ks ksmagnitude twomass_k twomass_ks k2m k_s",
  ks_mag_err:
    "ks_mag_err e_kmag e_ksmag ekmag kmag_err k_msigcom ks_msigcom e_ks e_k ks_cmsig k_cmsig ks_mag_error kmag_error ksmag_error ks_err ks_error",
  card_mag: "card_mag instrument_mag instrument_magnitude tmag t_mag passband_mag m_card",
  card_mag_err: "card_mag_err instrument_mag_err e_tmag card_mag_error instrument_mag_error",
  logg: "logg log_g logg_gspphot log(g) surface_gravity gravity log_g_cgs log_g_spec logg_spec loggspec surfacegravity logg_cgs",
  logg_err: "logg_err e_logg logg_error elogg e_log_g log_g_err logg_unc",
  feh: "feh fe_h [fe/h] mh m_h [m/h] mh_gspphot metallicity met metal feh_spec fe_h_spec iron_abundance mhspec metallicity_feh feh_dex",
  feh_err: "feh_err e_feh e_fe_h e_[fe/h] e_mh feh_error mh_err e_[m/h] efeh feh_unc",
  ruwe: "ruwe ruwe_dr3 gaia_ruwe renormalised_unit_weight_error",
  light_share: "light_share lightshare contamination_share target_fraction flux_fraction",
  teff: "teff t_eff teff_gspphot teffective temperature effective_temperature teff_k teff_spec temp teff_val t_effective teffspec effectivetemperature t_spec teffk temp_eff",
  distance: "distance dist distance_pc dist_pc r_est rgeo distpc rpgeo distance_pc_geo heliocentric_distance",
  distance_err: "distance_err e_distance distance_error dist_err e_dist dist_error",
  ebv: "ebv e(b-v) e_b_v color_excess colour_excess reddening e_bminusv ebminusv",
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

/** `e_Plx`, `sigma_parallax`, `err_plx`; `plx_err`, `pmRA error`, `teff_unc`: the error of what the rest names. */
const ERROR_FORMS: readonly RegExp[] = [
  /^(?:e|err|error|sig|sigma|s|unc|u|σ)[_ .](.+)$/i,
  /^(?:sigma|err|σ)[_ ]?\(?([^()]+)\)?$/i,
  /^(.+?)[_ .]?(?:errors?|err|unc|uncertainty|sigma|sig|std|stderr|stdev)$/i,
  /^(.+)[_ ]e$/i,
];

/** Behind every spelling that is known as a whole. */
const DERIVED_RANK = 100;

const errorOf = (header: string): Spelling | undefined => {
  for (const form of ERROR_FORMS) {
    const found = exact.get(plainHeader(form.exec(header)?.[1] ?? ""));
    if (found && findMeaning(errorKey(found.key)))
      return { spelling: found.spelling, key: errorKey(found.key), rank: found.rank + DERIVED_RANK };
  }
  return undefined;
};

/** What a header spelled like that means, where the spelling is one in use, or an error of one. */
export const meaningOfHeader = (header: string): Spelling | undefined => {
  const text = header.trim();
  return COLOUR_ERROR.test(text) ? undefined : (exact.get(plainHeader(text)) ?? errorOf(text));
};
