const GZIP = [0x1f, 0x8b];
const FITS = [...'SIMPLE  ='].map(character => character.charCodeAt(0));

/** Bytes at the start of a file that are enough to tell its kind. */
export const KIND_BYTES = FITS.length;

/** What a file's first bytes say it is, in words for people; '' where it looks like a text table. */
const SIGNATURES: readonly { readonly looksLike: string; readonly bytes: readonly number[] }[] = [
  { looksLike: 'a zip archive', bytes: [0x50, 0x4b, 0x03, 0x04] },
  { looksLike: 'a Parquet file', bytes: [0x50, 0x41, 0x52, 0x31] },
  { looksLike: 'a bzip2 archive', bytes: [0x42, 0x5a, 0x68] },
  { looksLike: 'an xz archive', bytes: [0xfd, 0x37, 0x7a, 0x58, 0x5a] },
  { looksLike: 'an HDF5 file', bytes: [0x89, 0x48, 0x44, 0x46] },
  { looksLike: 'a PNG picture', bytes: [0x89, 0x50, 0x4e, 0x47] },
  { looksLike: 'a JPEG picture', bytes: [0xff, 0xd8, 0xff] },
  { looksLike: 'a PDF document', bytes: [0x25, 0x50, 0x44, 0x46, 0x2d] },
  { looksLike: 'UTF-16 text', bytes: [0xff, 0xfe] },
  { looksLike: 'UTF-16 text', bytes: [0xfe, 0xff] },
];

const SAMPLE_BYTES = 4096;

/** Names what the bytes look like when they are not a text table, e.g. 'a FITS file'; otherwise ''. */
export function foreignKind(bytes: Uint8Array): string {
  const known = SIGNATURES.find(signature => beginsWith(bytes, signature.bytes));
  if (known !== undefined) return known.looksLike;
  const sample = bytes.subarray(0, SAMPLE_BYTES);
  if (sample.includes(0)) return 'a binary file';
  const head = new TextDecoder().decode(sample.subarray(0, 256)).trimStart();
  if (/^<(\?xml|!doctype|!--|[a-z]+[\s>/])/i.test(head)) return 'an XML or HTML document';
  if (/^[{[]\s*["{[\]}]/.test(head)) return 'a JSON document';
  return '';
}

export function isGzip(bytes: Uint8Array): boolean {
  return beginsWith(bytes, GZIP);
}

/** FITS Standard 4.0, 4.4.1.1: the first keyword of every file. */
export function isFits(bytes: Uint8Array): boolean {
  return beginsWith(bytes, FITS);
}

function beginsWith(bytes: Uint8Array, signature: readonly number[]): boolean {
  return signature.every((byte, i) => bytes[i] === byte);
}

/** Number of bytes of a UTF-8 byte order mark at the start. */
export function byteOrderMarkLength(bytes: Uint8Array): number {
  return bytes[0] === 0xef && bytes[1] === 0xbb && bytes[2] === 0xbf ? 3 : 0;
}
