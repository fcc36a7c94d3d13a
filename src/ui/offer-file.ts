/**
 * Gives a file to the person: through the share sheet where the device has one for files, else as a download. The answer
 * is false when the person closed the share sheet without sending it anywhere.
 */
export async function offerFile(file: File): Promise<boolean> {
	const touch = matchMedia('(pointer: coarse)').matches;
	if (touch && navigator.canShare?.({ files: [file] }) === true) {
		try {
			await navigator.share({ files: [file], title: file.name });
			return true;
		} catch (thrown) {
			if (thrown instanceof DOMException && thrown.name === 'AbortError') return false;
			// the share sheet refused this kind of file: a download always works
		}
	}
	const url = URL.createObjectURL(file);
	const link = document.createElement('a');
	link.href = url;
	link.download = file.name;
	document.body.append(link);
	link.click();
	link.remove();
	setTimeout(() => URL.revokeObjectURL(url), 60_000);
	return true;
}
