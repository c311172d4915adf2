/** What may be attached: checked by what the bytes are, never by what the name says. */
import { fileTypeFromBuffer } from 'file-type';
import sharp from 'sharp';

export const MOST_ATTACHMENT_BYTES = 10 * 1024 * 1024;
/** A page scanned at 600 dpi has some 35 million pixels. */
const MOST_PIXELS = 60_000_000;
const JPEG_QUALITY = 90;

export type UploadFailure = 'empty' | 'too large' | 'wrong type' | 'broken image' | 'broken PDF';

/** A file that may be kept. */
export interface CheckedUpload {
	bytes: Buffer;
	type: 'image/jpeg' | 'image/png' | 'image/webp' | 'application/pdf';
	ending: string;
}

/**
 * Checks an upload and makes it harmless: a picture is drawn anew, without what its file says beside the pixels (place, camera, names);
 * a PDF must be one from its beginning to its end.
 */
export async function checkUpload(bytes: Buffer): Promise<CheckedUpload | { failure: UploadFailure }> {
	if (bytes.length === 0) return { failure: 'empty' };
	if (bytes.length > MOST_ATTACHMENT_BYTES) return { failure: 'too large' };
	const sniffed = await fileTypeFromBuffer(bytes).catch(() => undefined);
	const mime = sniffed?.mime;
	if (mime === 'application/pdf')
		return isWholePdf(bytes) ? { bytes, type: mime, ending: 'pdf' } : { failure: 'broken PDF' };
	if (mime === 'image/jpeg' || mime === 'image/png' || mime === 'image/webp') return redrawn(bytes, mime);
	return { failure: 'wrong type' };
}

async function redrawn(
	bytes: Buffer,
	type: 'image/jpeg' | 'image/png' | 'image/webp'
): Promise<CheckedUpload | { failure: UploadFailure }> {
	try {
		// Rotated as its file asks, because that is lost with the rest of it.
		const picture = sharp(bytes, { limitInputPixels: MOST_PIXELS, failOn: 'error' }).rotate();
		if (type === 'image/png') return { bytes: await picture.png().toBuffer(), type, ending: 'png' };
		if (type === 'image/webp')
			return { bytes: await picture.webp({ quality: JPEG_QUALITY }).toBuffer(), type, ending: 'webp' };
		return { bytes: await picture.jpeg({ quality: JPEG_QUALITY }).toBuffer(), type, ending: 'jpg' };
	} catch {
		return { failure: 'broken image' };
	}
}

/**
 * Whether bytes are a PDF from its first line to its last (ISO 32000-1, 7.5: header, body, cross-reference, trailer): the header at the
 * very beginning, objects, `startxref` that points into the file, `%%EOF` at the end.
 * @internal for its test
 */
export function isWholePdf(bytes: Buffer): boolean {
	if (!/^%PDF-[12]\.\d/.test(bytes.subarray(0, 8).toString('latin1'))) return false;
	const end = bytes.subarray(-2048).toString('latin1');
	const place = /startxref\s+(\d+)\s+%%EOF\s*$/.exec(end)?.[1];
	if (place === undefined) return false;
	const at = Number(place);
	if (at <= 0 || at >= bytes.length) return false;
	// A table of references, or an object that holds them as a stream.
	return /^\s*(xref\b|\d+\s+\d+\s+obj\b)/.test(bytes.subarray(at, at + 64).toString('latin1'));
}

/** A file's name as it may be shown and saved: its last part, without what no file system or header takes. */
export function harmlessName(name: string): string {
	const last = name.split(/[\\/]/).at(-1) ?? '';
	const kept = last
		.normalize('NFC')
		.replace(/[\p{Cc}\p{Cf}"<>:|?*\\/]+/gu, '')
		.trim();
	return (kept.length > 100 ? kept.slice(-100) : kept) || 'file';
}
