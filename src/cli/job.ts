/** What the command line said, options by their long names. */
export interface Asked {
  readonly argument: readonly string[];
  readonly options: Readonly<Record<string, string | true>>;
  /** the command line as it could be typed again, without the program */
  readonly words: readonly string[];
}

/** Where a job writes to. */
export interface Console {
  readonly out: (text: string) => void;
  /** resolves when the reader of `out` has kept up */
  readonly settled: () => Promise<void>;
  readonly err: (text: string) => void;
  readonly colourOut: boolean;
  readonly colourErr: boolean;
  readonly quiet: boolean;
}

/** The work of one command; resolves to the exit code. */
export type Job = (asked: Asked, console: Console) => Promise<number>;
