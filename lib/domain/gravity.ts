/** How grave a finding is, gravest first. */
export const SEVERITIES = ['stop', 'review', 'controlled', 'caution', 'note'] as const;
export type Severity = (typeof SEVERITIES)[number];

/** What the findings amount to; `clear` when nothing above a note was found. */
export const DECISIONS = ['stop', 'review', 'controlled', 'caution', 'clear'] as const;
export type Decision = (typeof DECISIONS)[number];

/** 0 for the gravest; usable for both scales. */
export function gravityOf(level: Severity | Decision): number {
  return level === 'clear' || level === 'note' ? 4 : SEVERITIES.indexOf(level);
}
