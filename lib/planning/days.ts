/**
 * Day arithmetic on ISO days (`2026-12-03`) without a clock or a time zone: a day is counted as whole days since
 * 1970-01-01 in the proleptic Gregorian calendar.
 */
const ISO_DAY = /^(\d{4})-(\d{2})-(\d{2})$/;

/**
 * Days since 1970-01-01 (negative before it).
 * @see Howard Hinnant, "chrono-compatible low-level date algorithms", days_from_civil
 * @throws RangeError if the text is not an existing day written `YYYY-MM-DD`
 */
export function dayNumber(isoDay: string): number {
  const match = ISO_DAY.exec(isoDay);
  if (match === null) throw new RangeError(`"${isoDay}" is not a day written YYYY-MM-DD`);
  const [year, month, day] = [Number(match[1]), Number(match[2]), Number(match[3])];
  const shifted = month <= 2 ? year - 1 : year;
  const era = Math.floor(shifted / 400);
  const yearOfEra = shifted - era * 400;
  const dayOfYear = Math.floor((153 * ((month + 9) % 12) + 2) / 5) + day - 1;
  const dayOfEra = yearOfEra * 365 + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100) + dayOfYear;
  const number = era * 146_097 + dayOfEra - 719_468;
  if (isoDayOf(number) !== isoDay) throw new RangeError(`"${isoDay}" is not a day of the calendar`);
  return number;
}

/**
 * The ISO day of a day number: the inverse of `dayNumber`.
 * @throws RangeError if the number is not an integer or lies outside the years 0000 to 9999
 */
export function isoDayOf(day: number): string {
  if (!Number.isSafeInteger(day)) throw new RangeError(`${day} is not a whole number of days`);
  const shifted = day + 719_468;
  const era = Math.floor(shifted / 146_097);
  const dayOfEra = shifted - era * 146_097;
  const yearOfEra = Math.floor(
    (dayOfEra -
      Math.floor(dayOfEra / 1460) +
      Math.floor(dayOfEra / 36_524) -
      Math.floor(dayOfEra / 146_096)) /
      365,
  );
  const dayOfYear = dayOfEra - (365 * yearOfEra + Math.floor(yearOfEra / 4) - Math.floor(yearOfEra / 100));
  const monthFromMarch = Math.floor((5 * dayOfYear + 2) / 153);
  const dayOfMonth = dayOfYear - Math.floor((153 * monthFromMarch + 2) / 5) + 1;
  const month = monthFromMarch < 10 ? monthFromMarch + 3 : monthFromMarch - 9;
  const year = yearOfEra + era * 400 + (month <= 2 ? 1 : 0);
  if (year < 0 || year > 9999) throw new RangeError(`day ${day} lies outside the years 0000 to 9999`);
  return `${String(year).padStart(4, '0')}-${String(month).padStart(2, '0')}-${String(dayOfMonth).padStart(2, '0')}`;
}

/** The ISO day `days` later (earlier if negative). */
export function addDays(isoDay: string, days: number): string {
  return isoDayOf(dayNumber(isoDay) + days);
}

/** Day of the week, 0 for Monday to 6 for Sunday (1970-01-01 was a Thursday). */
export function weekday(day: number): number {
  return (((day + 3) % 7) + 7) % 7;
}
