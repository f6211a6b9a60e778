import {
  vectorNames,
  type TrialVectors,
  type VectorName,
} from "@/analytics/volumetrics/results-schema";

/**
 * Trial vectors as columns of bytes: little-endian float32. Seven digits are far more than a volume deserves, and half
 * the bytes of a double.
 */
export type StoredVectors = Record<VectorName, Buffer>;

const bytesPerValue = 4;
const isLittleEndian = new Uint8Array(new Uint16Array([1]).buffer)[0] === 1;

/** @throws {RangeError} when a value is not finite: such a trial must never be stored */
export function encodeVectors(vectors: TrialVectors): StoredVectors {
  return byName((name) => {
    const values = Float32Array.from(vectors[name]);
    if (!values.every(Number.isFinite)) throw new RangeError(`${name} has a trial without a value`);
    const bytes = Buffer.from(values.buffer);
    return isLittleEndian ? bytes : bytes.swap32();
  });
}

/** @param bytes  a column as the database returns it; it is copied, for its offset may not suit a Float32Array */
export function decodeVector(bytes: Buffer): Float32Array {
  const copy = Buffer.alloc(bytes.length);
  bytes.copy(copy);
  if (!isLittleEndian) copy.swap32();
  return new Float32Array(copy.buffer, copy.byteOffset, copy.length / bytesPerValue);
}

function byName<Value>(make: (name: VectorName) => Value): Record<VectorName, Value> {
  return Object.fromEntries(vectorNames.map((name) => [name, make(name)])) as Record<
    VectorName,
    Value
  >;
}
