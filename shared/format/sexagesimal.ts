/** Positions as hours or degrees, minutes and seconds. Rounded as a whole before it is split, so that 60.00 cannot occur. */

interface Parts {
  readonly whole: number;
  readonly minutes: number;
  readonly seconds: string;
}

const split = (value: number, decimals: number): Parts => {
  const scale = 10 ** decimals;
  const ticks = Math.round(value * 3600 * scale);
  const perMinute = 60 * scale;
  const whole = Math.floor(ticks / (60 * perMinute));
  const minutes = Math.floor((ticks - whole * 60 * perMinute) / perMinute);
  const seconds = (ticks - whole * 60 * perMinute - minutes * perMinute) / scale;
  return {
    whole,
    minutes,
    seconds: seconds.toFixed(decimals).padStart(decimals === 0 ? 2 : decimals + 3, "0"),
  };
};

const two = (value: number): string => String(value).padStart(2, "0");

/**
 * Right ascension as `hh mm ss.ssss`; 359.99999999° carries to 00 00 00.0000.
 *
 * @param degrees 0 to 360
 * @param decimals of the seconds; 4 is about 1 mas
 */
export const rightAscensionText = (degrees: number, decimals = 4): string => {
  const { whole, minutes, seconds } = split((((degrees % 360) + 360) % 360) / 15, decimals);
  return `${two(whole % 24)} ${two(minutes)} ${seconds}`;
};

/**
 * Declination as `±dd mm ss.sss`; the sign is always there, also on −00.
 *
 * @param degrees −90 to 90
 * @param minus the minus to use: U+2212 on screen, "-" in files
 */
export const declinationText = (degrees: number, decimals = 3, minus = "\u2212"): string => {
  const { whole, minutes, seconds } = split(Math.abs(degrees), decimals);
  return `${degrees < 0 || Object.is(degrees, -0) ? minus : "+"}${two(whole)} ${two(minutes)} ${seconds}`;
};
