import type { z } from 'zod';

const KINDS: Readonly<Record<string, string>> = {
  number: 'Give a number.',
  int: 'Give a whole number.',
  string: 'Give some text.',
  boolean: 'Say yes or no.',
  array: 'Give a list.',
  object: 'Give an object.',
  record: 'Give an object.',
};
const FORMATS: Readonly<Record<string, string>> = {
  uuid: 'Choose one that exists.',
  email: 'Not an e-mail address.',
  date: 'Not a date; write it as 2031-05-28.',
  datetime: 'Not a date with an hour.',
};

/**
 * What is wrong with a value in the words of a reader, where the schema itself says nothing.
 * @returns undefined where the library's own words will do
 */
export function plainWords(issue: z.core.$ZodRawIssue): string | undefined {
  switch (issue.code) {
    case 'invalid_type':
      return issue.input === undefined
        ? `This is missing. ${KINDS[issue.expected] ?? ''}`.trim()
        : KINDS[issue.expected];
    case 'invalid_format':
      return issue.input === '' ? 'This is missing.' : FORMATS[issue.format];
    case 'invalid_value':
      return `Choose one of: ${issue.values.map(String).join(', ')}.`;
    default:
      return undefined;
  }
}
