/** Buffers for one tile size, to be used again for each tile. */
export interface ReceiverRoom {
  readonly to: Int32Array;
  readonly lower: Uint8Array;
  readonly pits: Int32Array;
  readonly saddles: Int32Array;
  readonly keys: Int32Array;
}

export function receiverRoom(cells: number): ReceiverRoom {
  return {
    to: new Int32Array(cells),
    lower: new Uint8Array(cells),
    pits: new Int32Array(cells),
    saddles: new Int32Array(cells),
    keys: new Int32Array(cells),
  };
}
