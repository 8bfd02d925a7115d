/** Where a command's words go; tests hand in their own. */
export interface Streams {
  readonly out: (text: string) => void;
  readonly error: (text: string) => void;
  readonly useColour: boolean;
}

/** The command line, or the files it names, are at fault; the message is for the user. Ends in exit status 2. */
export class UsageError extends Error {
  override readonly name = 'UsageError';
}
