type Words = readonly [found: string, expected: string, mend?: string];

const unknown: Words = ['text that YAML cannot read', '`key: value` lines'];

/** By the parser's codes. */
const syntaxTexts: ReadonlyMap<string, Words> = new Map<string, Words>([
  ['TAB_AS_INDENT', ['a tab as indentation', 'spaces', 'replace the tab by two spaces']],
  ['BAD_INDENT', ['an indentation that fits no level above', 'entries of one map in one column']],
  [
    'BAD_ALIAS',
    ['an alias without its anchor', 'every value written out', 'write the value; aliases are not used here'],
  ],
  [
    'MISSING_CHAR',
    ['a missing character: a bracket, quote or colon', 'brackets and quotes in pairs, `key: value`'],
  ],
  ['MULTILINE_IMPLICIT_KEY', ['a key that runs over several lines', '`key: value` on one line']],
  [
    'BLOCK_AS_IMPLICIT_KEY',
    ['a second `: ` in one line', 'one key to a line', 'put texts that hold a colon in quotes'],
  ],
  [
    'UNEXPECTED_TOKEN',
    ['a character that does not belong here', '`key: value`', 'put texts with special characters in quotes'],
  ],
  ['TAG_RESOLVE_FAILED', ['a tag', 'values without tags', 'remove it']],
  ['IMPOSSIBLE', ['text that cannot be read', '`key: value` lines']],
  ['RESOURCE_EXHAUSTION', ['collections nested too deep', 'a plain case file']],
]);

/** What was found, what was expected and how to mend it, for a syntax error by the YAML parser's code. */
export function describeSyntaxError(code: string): Words {
  return syntaxTexts.get(code) ?? unknown;
}
