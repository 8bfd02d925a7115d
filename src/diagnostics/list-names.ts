/** More names than this say nothing to a reader. */
const mostListed = 30;

/**
 * Names for a message, separated by commas; of a long list the beginning and how many there are.
 *
 * @param names - in the order in which they are to be read
 */
export function listNames(names: readonly string[]): string {
  if (names.length <= mostListed) return names.join(', ');
  return `${names.slice(0, mostListed).join(', ')}, … (${names.length} in all)`;
}
