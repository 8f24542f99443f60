/** What a file may claim before it is refused; all are checked before memory is taken. */
export interface ReadLimits {
  /** Directories in the file's chain. */
  readonly directories: number;
  /** Entries in one directory. */
  readonly entries: number;
  /** Bytes of one entry's values. */
  readonly valueBytes: number;
  /** Bytes of one strip or tile once decoded. */
  readonly blockBytes: number;
  /** Cells of the terrain that is made. */
  readonly cells: number;
  /** Files up to this size are read whole, so that their hash is that of the file. */
  readonly wholeFileBytes: number;
}

export const defaultLimits: ReadLimits = {
  directories: 64,
  entries: 1024,
  valueBytes: 64 * 2 ** 20,
  blockBytes: 256 * 2 ** 20,
  cells: 100_000_000,
  wholeFileBytes: 128 * 2 ** 20,
};

/** Cells that any file may have, however small it is; above, a file must be as large as the next constant asks. */
export const cellsBeyondDoubt = 1_000_000;

/** Most cells that one byte of file stands for: a generous bound for constant or sparse data. */
export const cellsPerByte = 4096;
