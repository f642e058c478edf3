import type { Band } from '../../science/bands.js';
import type { PlainMeaning } from './meanings.js';

/**
 * Column names that are recognised without being named in the profile, as archives and pipelines use them.
 * Capitals count where they tell two bands apart (gmag, Gmag), and nowhere else; '-' and ' ' equal '_'.
 * Of id, ra and dec the first that a table has is taken; for the others two candidates are a question.
 */
export const PLAIN_NAMES: Readonly<Record<PlainMeaning, readonly string[]>> = {
  id: [
    'source_id',
    'Source',
    'GaiaDR3',
    'DR3Name',
    'objid',
    'id',
    'star_id',
    'star',
    'object_id',
    'identifier',
    'designation',
    'main_id',
    'name',
    'Gaia',
    '2MASS',
    'SDSS',
    'PS1',
    'TYC',
    'HIP',
    'HD',
    'target',
    'number',
  ],
  ra: [
    'ra',
    'RA_ICRS',
    'RAJ2000',
    '_RAJ2000',
    'RAdeg',
    'raMean',
    'ra_j2000',
    'ALPHA_J2000',
    '_RA',
    '_RA_icrs',
    'alpha',
  ],
  dec: [
    'dec',
    'DE_ICRS',
    'DEJ2000',
    '_DEJ2000',
    'DEdeg',
    'decMean',
    'dec_j2000',
    'DELTA_J2000',
    '_DE',
    '_DE_icrs',
    'delta',
    'decl',
    'declination',
  ],
  parallax: ['parallax', 'plx', 'plx_value'],
  parallax_error: [
    'parallax_error',
    'e_plx',
    'plx_error',
    'plx_err',
    'e_parallax',
    'parallax_err',
    'sigma_parallax',
  ],
  pmra: ['pmra', 'pm_ra', 'pmra_cosdec', 'pm_ra_cosdec', 'pmRAcosDE'],
  pmdec: ['pmdec', 'pm_dec', 'pmDE', 'pm_de'],
  ebv: ['ebv', 'E(B-V)', 'reddening', 'reddening_EBV'],
  time: ['mjd', 'jd', 'mjd_obs', 'mjd_mid', 'jd_mid', 'obs_time', 'obstime', 'date_obs', 'time'],
  mag: ['mag', 'magnitude', 'mag_cal', 'cal_mag'],
  mag_error: [
    'mag_error',
    'mag_err',
    'magerr',
    'e_mag',
    'err',
    'error',
    'merr',
    'sigma',
    'mag_sigma',
    'sigma_mag',
  ],
  band: ['band', 'filter', 'filt', 'passband'],
  flag: [
    'flag',
    'flags',
    'saturated',
    'is_saturated',
    'blended',
    'is_blended',
    'edge',
    'near_edge',
    'suspect',
    'flag_saturated',
    'flag_blended',
    'flag_edge',
    'phot_flag',
    'bad',
  ],
};

/** How tables abbreviate a band inside column names. */
export const BAND_STEMS: Readonly<Record<Band, readonly string[]>> = {
  U: ['U'],
  B: ['B'],
  V: ['V'],
  Rc: ['Rc', 'R_c', 'R_cousins'],
  Ic: ['Ic', 'I_c', 'I_cousins'],
  J: ['J'],
  H: ['H'],
  Ks: ['Ks', 'K', 'K_s'],
  G: ['G', 'phot_g_mean'],
  BP: ['BP', 'GBP', 'G_BP', 'phot_bp_mean'],
  RP: ['RP', 'GRP', 'G_RP', 'phot_rp_mean'],
  u: ['u', "u'", 'u_sdss'],
  g: ['g', "g'", 'g_sdss'],
  r: ['r', "r'", 'r_sdss'],
  i: ['i', "i'", 'i_sdss'],
  z: ['z', "z'", 'z_sdss'],
  gP1: ['gP1', 'g_P1', 'g_ps1'],
  rP1: ['rP1', 'r_P1', 'r_ps1'],
  iP1: ['iP1', 'i_P1', 'i_ps1'],
  zP1: ['zP1', 'z_P1', 'z_ps1'],
  yP1: ['yP1', 'y_P1', 'y_ps1', 'y'],
};

/** Stems of Johnson or Cousins R and I: different bands under one name, so the profile has to say which. */
export const DOUBTFUL_STEMS: Readonly<Record<string, Band>> = { R: 'Rc', I: 'Ic' };

/** '{}' stands for a stem; the first is the bare stem. */
export const MAG_PATTERNS: readonly string[] = ['{}', '{}mag', '{}_mag', 'mag_{}', 'mag{}', '{}_magnitude'];

export const MAG_ERROR_PATTERNS: readonly string[] = [
  ...[
    'e_{}mag',
    'e_{}',
    'e_{}_mag',
    '{}err',
    '{}_err',
    '{}_error',
    '{}_sigma',
    '{}_unc',
    'err_{}',
    'error_{}',
  ],
  ...[
    'sigma_{}',
    'sig_{}',
    '{}mag_err',
    '{}mag_error',
    '{}_mag_err',
    '{}_mag_error',
    '{}magerr',
    '{}_magerr',
  ],
  ...['mag_err_{}', 'mag_error_{}', 'magerr_{}', 'e_mag_{}', 'sigma_{}mag', 'sigma_{}_mag', 'sigma_mag_{}'],
];

/** Flux over its error, from which a magnitude error follows. */
export const FLUX_OVER_ERROR_PATTERNS: readonly string[] = ['{}_flux_over_error'];

/** Names of single archives that follow no pattern. */
export const ARCHIVE_MAGS: Readonly<Partial<Record<Band, readonly string[]>>> = {
  J: ['j_m'],
  H: ['h_m'],
  Ks: ['k_m'],
  u: ['psfMag_u'],
  g: ['psfMag_g'],
  r: ['psfMag_r'],
  i: ['psfMag_i'],
  z: ['psfMag_z'],
  gP1: ['gMeanPSFMag'],
  rP1: ['rMeanPSFMag'],
  iP1: ['iMeanPSFMag'],
  zP1: ['zMeanPSFMag'],
  yP1: ['yMeanPSFMag'],
};

export const ARCHIVE_MAG_ERRORS: Readonly<Partial<Record<Band, readonly string[]>>> = {
  J: ['j_msigcom'],
  H: ['h_msigcom'],
  Ks: ['k_msigcom'],
  u: ['psfMagErr_u'],
  g: ['psfMagErr_g'],
  r: ['psfMagErr_r'],
  i: ['psfMagErr_i'],
  z: ['psfMagErr_z'],
  gP1: ['gMeanPSFMagErr'],
  rP1: ['rMeanPSFMagErr'],
  iP1: ['iMeanPSFMagErr'],
  zP1: ['zMeanPSFMagErr'],
  yP1: ['yMeanPSFMagErr'],
};

/** Colours under the names of one archive, which could be read otherwise. */
export const ARCHIVE_COLOURS: Readonly<Record<string, readonly [blue: Band, red: Band]>> = {
  bp_rp: ['BP', 'RP'],
  bp_g: ['BP', 'G'],
  g_rp: ['G', 'RP'],
};

/** '{a}' and '{b}' stand for the stems of the two bands. */
export const COLOUR_PATTERNS: readonly string[] = ['{a}-{b}', '{a}_{b}', '({a}-{b})'];

export const COLOUR_ERROR_PATTERNS: readonly string[] = [
  'e_{a}-{b}',
  'e_{a}_{b}',
  '{a}-{b}_err',
  '{a}_{b}_error',
];

/** Content descriptors that are precise enough to go by: those of magnitudes do not tell systems apart. */
export const UCD_MEANINGS: Readonly<Record<string, PlainMeaning>> = {
  'meta.id;meta.main': 'id',
  'pos.eq.ra;meta.main': 'ra',
  'pos.eq.dec;meta.main': 'dec',
  'pos.eq.ra': 'ra',
  'pos.eq.dec': 'dec',
  'pos.parallax': 'parallax',
  'pos.parallax.trig': 'parallax',
  'stat.error;pos.parallax': 'parallax_error',
  'stat.error;pos.parallax.trig': 'parallax_error',
  'pos.pm;pos.eq.ra': 'pmra',
  'pos.pm;pos.eq.dec': 'pmdec',
};
