/** The longest side of a kept photo, in pixels. */
const LONGEST = 1600;
const QUALITY = 0.82;

/**
 * A picture from the camera or a file as the book keeps it: JPEG, at most 1600 px on its longer side, drawn anew so that
 * place and time of the shot (EXIF) do not come along. Null when it is no picture that this device can read.
 */
export async function shrinkPhoto(file: Blob): Promise<{ readonly bytes: ArrayBuffer; readonly type: string } | null> {
	let picture: ImageBitmap;
	try {
		picture = await createImageBitmap(file, { imageOrientation: 'from-image' });
	} catch {
		return null;
	}
	const scale = Math.min(1, LONGEST / Math.max(picture.width, picture.height));
	const canvas = document.createElement('canvas');
	canvas.width = Math.max(1, Math.round(picture.width * scale));
	canvas.height = Math.max(1, Math.round(picture.height * scale));
	canvas.getContext('2d')?.drawImage(picture, 0, 0, canvas.width, canvas.height);
	picture.close();
	const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/jpeg', QUALITY));
	return blob === null ? null : { bytes: await blob.arrayBuffer(), type: blob.type };
}
