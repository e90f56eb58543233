/** A year of 365.25 days, s. Every yearly rate in the engine refers to it. */
export const YEAR_S = 31_557_600;

/** A calendar month as a twelfth of the year, s. */
export const MONTH_S = 2_629_800;

/** A day, s. */
export const DAY_S = 86_400;

/** An hour, s. */
export const HOUR_S = 3_600;

/** A minute, s. */
export const MINUTE_S = 60;

/** One milliampere-hour, C. */
export const MAH_C = 3.6;

/** 0 °C in kelvin. */
export const KELVIN_OFFSET = 273.15;

/** Molar gas constant, J/(mol·K), exact since the redefinition of the SI in 2019. */
export const GAS_CONSTANT = 8.314462618;
