// How a program that npm starts was called, and where it tells what it does.

/** Where a program tells of itself: what it made on one side, what went wrong on the other. */
export interface Telling {
  readonly print: (line: string) => void;
  readonly printError: (line: string) => void;
}

/** The words after `--`, and the folder and the environment to run in. */
export interface Call extends Telling {
  readonly words: readonly string[];
  readonly folder: string;
  readonly environment: NodeJS.ProcessEnv;
}

/** The call of the running process. */
export const thisCall = (): Call => ({
  words: process.argv.slice(2),
  folder: process.cwd(),
  environment: process.env,
  print: (line) => console.log(line),
  printError: (line) => console.error(line),
});
