import { endianness } from 'node:os';

const swap = endianness() === 'BE';

/** The stored form of values: little-endian Float64. Shares the array's memory; write it before changing the array. */
export function blobOfValues(values: Float64Array): Buffer {
  const bytes = blobOf(values);
  return swap ? Buffer.from(bytes).swap64() : bytes;
}

/** A typed array's bytes, sharing its memory. */
export const blobOf = (array: Float64Array | Uint8Array): Buffer =>
  Buffer.from(array.buffer, array.byteOffset, array.byteLength);

/** Values out of their stored form: a view on the blob where it lies on an 8-byte boundary, else a copy. */
export function valuesOfBlob(blob: Buffer): Float64Array<ArrayBuffer> {
  const buffer = blob.buffer as ArrayBuffer;
  if (!swap && blob.byteOffset % 8 === 0) return new Float64Array(buffer, blob.byteOffset, blob.byteLength / 8);
  const copy = new Uint8Array(blob.byteLength);
  copy.set(blob);
  if (swap) Buffer.from(copy.buffer).swap64();
  return new Float64Array(copy.buffer);
}

/** Bytes out of a blob, sharing its memory. */
export const bytesOfBlob = (blob: Buffer): Uint8Array<ArrayBuffer> =>
  new Uint8Array(blob.buffer as ArrayBuffer, blob.byteOffset, blob.byteLength);
