import fc from 'fast-check';
import { addDays, dayNumber, isoDayOf, weekday } from '@/lib/planning/days';

describe('days', () => {
  test('agree with the platform calendar for every day of six centuries sampled', () => {
    fc.assert(
      fc.property(fc.integer({ min: -100_000, max: 120_000 }), (day) => {
        const iso = new Date(day * 86_400_000).toISOString().slice(0, 10);
        expect(isoDayOf(day)).toBe(iso);
        expect(dayNumber(iso)).toBe(day);
        expect(weekday(day)).toBe((new Date(day * 86_400_000).getUTCDay() + 6) % 7);
      }),
    );
  });

  test('leap days and ends of months', () => {
    expect(addDays('2028-02-28', 1)).toBe('2028-02-29');
    expect(addDays('2027-02-28', 1)).toBe('2027-03-01');
    expect(addDays('2027-01-01', -1)).toBe('2026-12-31');
  });

  test('days that are not in the calendar are refused', () => {
    for (const bad of [
      '2027-02-29',
      '2027-13-01',
      '2027-00-10',
      '27-01-01',
      '2027-1-1',
      '',
      '2027-01-01T00:00',
    ]) {
      expect(() => dayNumber(bad)).toThrow(RangeError);
    }
    expect(() => isoDayOf(1.5)).toThrow(RangeError);
    expect(() => isoDayOf(Number.NaN)).toThrow(RangeError);
  });
});
