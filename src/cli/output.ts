import { fstatSync, writeSync } from "node:fs";
import { EXIT } from "../messages/index.ts";

/** Standard output or error. */
export interface Output {
  readonly write: (text: string) => void;
  /** resolves when the reader has kept up */
  readonly settled: () => Promise<void>;
  readonly isTTY: boolean;
}

/** Device numbers of the Linux null device: a character device as terminals are. */
const NULL_DEVICE = 0x103;

/**
 * An output that writes straight to its file descriptor: loading Node's streams costs a tenth of a whole start. It falls back on the stream
 * where that is needed: on terminals, and on pipes that cannot take everything at once.
 */
export function openOutput(descriptor: 1 | 2): Output {
  let stream: NodeJS.WriteStream | null = isTerminalLike(descriptor) ? streamOf(descriptor) : null;
  return {
    write(text) {
      const rest = stream === null ? writeDirectly(descriptor, Buffer.from(text)) : text;
      if (rest.length === 0) return;
      stream ??= streamOf(descriptor);
      stream.write(rest);
    },
    settled: () =>
      new Promise((resolve) => {
        if (stream?.writableNeedDrain === true) stream.once("drain", () => resolve());
        else resolve();
      }),
    isTTY: stream?.isTTY === true,
  };
}

function isTerminalLike(descriptor: number): boolean {
  try {
    const about = fstatSync(descriptor);
    return about.isCharacterDevice() && about.rdev !== NULL_DEVICE;
  } catch {
    return true;
  }
}

function streamOf(descriptor: 1 | 2): NodeJS.WriteStream {
  const stream = descriptor === 1 ? process.stdout : process.stderr;
  stream.on("error", readerGone);
  return stream;
}

/** What could not be written because the reader is slow. */
function writeDirectly(descriptor: number, bytes: Buffer): Buffer {
  let rest = bytes;
  while (rest.length > 0) {
    try {
      rest = rest.subarray(writeSync(descriptor, rest));
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === "EAGAIN") return rest;
      readerGone(error as NodeJS.ErrnoException);
    }
  }
  return rest;
}

/** A reader that has seen enough (`| head -1`) is no fault. */
function readerGone(error: NodeJS.ErrnoException): void {
  if (error.code === "EPIPE") process.exit(EXIT.done);
  throw error;
}
