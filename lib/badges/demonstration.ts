/** A line of the header that the closed-form generator writes into every file it makes. */
const WATERMARK = /^#.*stylised closed-form demonstration signal/im;

/** Bytes of a file's beginning in which the watermark stands, if it stands anywhere. */
export const HEAD_BYTES = 4096;

export const isWatermarked = (head: Uint8Array): boolean => WATERMARK.test(Buffer.from(head.subarray(0, HEAD_BYTES)).toString('latin1'));
