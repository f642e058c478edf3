/** Words that stand for "no value" in number columns of pipelines and archives, in lower case. */
const MISSING_WORDS: readonly string[] = [
  ...[
    '',
    'nan',
    'null',
    'none',
    'n/a',
    'na',
    'nd',
    'inf',
    '+inf',
    '-inf',
    'infinity',
    'indef',
    'masked',
    '\\n',
  ],
  ...['-', '--', '---', '----', '.', '..', '...', '*', '**', '?'],
];

/** The words above and those of the profile. */
export function missingWords(more: readonly string[]): ReadonlySet<string> {
  return new Set([...MISSING_WORDS, ...more.map(word => word.trim().toLowerCase())]);
}
