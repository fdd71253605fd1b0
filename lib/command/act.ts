// What a command is: its words and options as help shows them and as they are read, and what it answers.

/** An option; without `value` it is a switch. */
export interface Option {
  /** What stands for its value in help. */
  readonly value?: string;
  readonly needed?: boolean;
  /** May be given several times. */
  readonly many?: boolean;
  readonly about: string;
}

/** A command: how it is used, and where what it does is found. */
export interface Act {
  readonly name: string;
  readonly summary: string;
  readonly operand?: { readonly name: string; readonly needed: boolean };
  readonly options: Readonly<Record<string, Option>>;
  /** What a chemist has to know beyond the options, a paragraph each. */
  readonly notes: readonly string[];
  readonly example: string;
  /** Loaded only when it is used, so that help and quick commands do not wait for the others. */
  readonly load: () => Promise<{ readonly run: Run }>;
}

/** The words of a call, read. */
export interface Given {
  readonly operand?: string;
  readonly text: Readonly<Record<string, string | undefined>>;
  readonly texts: Readonly<Record<string, readonly string[] | undefined>>;
  readonly isOn: (option: string) => boolean;
}

/** Where a command runs. */
export interface Surroundings {
  readonly folder: string;
  /** Columns of the terminal. */
  readonly width: number;
  readonly environment: Readonly<Record<string, string | undefined>>;
  readonly readStdin: () => Promise<string>;
  readonly print: (line: string) => void;
  readonly printError: (line: string) => void;
}

/** 0 done, 1 the question was answered with no, 2 there is no answer. */
export type ExitCode = 0 | 1 | 2;

/** What a command does; what it prints is all of it or nothing, unless it runs for minutes. */
export type Run = (given: Given, around: Surroundings) => ExitCode | Promise<ExitCode>;
