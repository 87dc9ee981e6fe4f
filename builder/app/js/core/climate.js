/** Sun, day length, Hargreaves-Samani evaporation and lapse (FAO-56). Months stand at the 15th. */
import { needMonths, needNotNegative, needNumber, refuse } from './refusal.js';

export const MONTH_DAYS = [31, 28, 31, 30, 31, 30, 31, 31, 30, 31, 30, 31];
export const MID_MONTH_DAY = MONTH_DAYS.map((_, i) => MONTH_DAYS.slice(0, i).reduce((a, b) => a + b, 0) + 15);

/** @param {number} degrees */
export const radians = (degrees) => (degrees * Math.PI) / 180;

function latitudeRad(latitude_deg) {
  const latitude = needNumber('latitude_deg', latitude_deg);
  if (latitude < -90 || latitude > 90) refuse('latitude', { value: latitude_deg });
  return radians(latitude);
}

function yearAngle(day_of_year) {
  const day = needNumber('day_of_year', day_of_year);
  if (!Number.isInteger(day) || day < 1 || day > 366) refuse('day_of_year', { value: day_of_year });
  return (2 * Math.PI * day) / 365;
}

/** Inverse relative distance to the sun, Eq. 23. @param {{day_of_year: number}} of */
export function sunDistanceFactor({ day_of_year }) {
  return 1 + 0.033 * Math.cos(yearAngle(day_of_year));
}

/** Solar declination, Eq. 24. [rad] @param {{day_of_year: number}} of */
export function declinationRad({ day_of_year }) {
  return 0.409 * Math.sin(yearAngle(day_of_year) - 1.39);
}

/**
 * Hour angle of sunset, Eq. 25; beyond the polar circles the sun may not set or not rise. [rad]
 * @param {{latitude_deg: number, day_of_year: number}} of
 */
export function sunsetHourAngleRad({ latitude_deg, day_of_year }) {
  const tangents = -Math.tan(latitudeRad(latitude_deg)) * Math.tan(declinationRad({ day_of_year }));
  return Math.acos(Math.max(-1, Math.min(1, tangents)));
}

/** Extraterrestrial radiation, Eq. 21. [MJ m-2 day-1] @param {{latitude_deg: number, day_of_year: number}} of */
export function radiationMjM2({ latitude_deg, day_of_year }) {
  const latitude = latitudeRad(latitude_deg);
  const declination = declinationRad({ day_of_year });
  const sunset = sunsetHourAngleRad({ latitude_deg, day_of_year });
  let path = sunset * Math.sin(latitude) * Math.sin(declination);
  path += Math.cos(latitude) * Math.cos(declination) * Math.sin(sunset);
  return ((24 * 60) / Math.PI) * 0.082 * sunDistanceFactor({ day_of_year }) * Math.max(0, path);
}

/** Water this radiation could evaporate, Eq. 20. [mm] @param {{radiation_mj_m2: number}} of */
export function evaporationEquivalentMm({ radiation_mj_m2 }) {
  return 0.408 * needNotNegative('radiation_mj_m2', radiation_mj_m2);
}

/** Hours from sunrise to sunset, Eq. 34. @param {{latitude_deg: number, day_of_year: number}} of */
export function daylightH({ latitude_deg, day_of_year }) {
  return (24 / Math.PI) * sunsetHourAngleRad({ latitude_deg, day_of_year });
}

/** Twelve mid-month radiations. @param {{latitude_deg: number}} of */
export function monthlyRadiationMjM2({ latitude_deg }) {
  return MID_MONTH_DAY.map((day_of_year) => radiationMjM2({ latitude_deg, day_of_year }));
}

/** Twelve mid-month day lengths. @param {{latitude_deg: number}} of */
export function monthlyDaylightH({ latitude_deg }) {
  return MID_MONTH_DAY.map((day_of_year) => daylightH({ latitude_deg, day_of_year }));
}

/**
 * Reference evaporation of a day, Eq. 52. [mm day-1] Below a mean of -17.8 C there is none.
 * @param {{tmax_c: number, tmin_c: number, radiation_mj_m2: number}} of
 */
export function hargreavesMmDay({ tmax_c, tmin_c, radiation_mj_m2 }) {
  const high = needNumber('tmax_c', tmax_c);
  const low = needNumber('tmin_c', tmin_c);
  if (high < low) refuse('tmax_below_tmin', { tmax_c, tmin_c });
  const water = evaporationEquivalentMm({ radiation_mj_m2 });
  return Math.max(0, 0.0023 * ((high + low) / 2 + 17.8) * Math.sqrt(high - low) * water);
}

/** @param {{latitude_deg: number, tmax_c: number[], tmin_c: number[]}} of @returns {number[]} mm month-1 */
export function hargreavesMonthsMm({ latitude_deg, tmax_c, tmin_c }) {
  const highs = needMonths('tmax_c', tmax_c);
  const lows = needMonths('tmin_c', tmin_c);
  return monthlyRadiationMjM2({ latitude_deg }).map(
    (radiation_mj_m2, i) =>
      hargreavesMmDay({ tmax_c: highs[i], tmin_c: lows[i], radiation_mj_m2 }) * MONTH_DAYS[i],
  );
}

/**
 * A temperature carried to another height; -6.5 is the standard atmosphere. [C]
 * @param {{temperature_c: number, from_m: number, to_m: number, change_c_per_km?: number}} of
 */
export function temperatureAtHeightC({ temperature_c, from_m, to_m, change_c_per_km = -6.5 }) {
  const rise = (needNumber('to_m', to_m) - needNumber('from_m', from_m)) / 1000;
  return needNumber('temperature_c', temperature_c) + needNumber('change_c_per_km', change_c_per_km) * rise;
}

/**
 * A month's rain carried to another height, gain compounded for each kilometre. [mm]
 * @param {{rain_mm: number, from_m: number, to_m: number, gain_per_km: number}} of
 */
export function rainAtHeightMm({ rain_mm, from_m, to_m, gain_per_km }) {
  const gain = needNumber('gain_per_km', gain_per_km);
  if (gain <= -1) refuse('not_above_zero', { field: '1 + gain_per_km', value: 1 + gain });
  const rise = (needNumber('to_m', to_m) - needNumber('from_m', from_m)) / 1000;
  return needNotNegative('rain_mm', rain_mm) * (1 + gain) ** rise;
}
