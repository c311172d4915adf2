/** Times the size of the drawing, so that it prints well. */
const SCALE = 3;

/**
 * Makes a PNG of a drawing of this server and hands it to the browser as a download.
 *
 * @param address of the SVG, which carries its own width and height
 * @param name of the file
 * @throws when the drawing cannot be had or drawn
 */
export async function savePng(address: string, name: string): Promise<void> {
	const response = await fetch(address);
	if (!response.ok) throw new Error(`The drawing could not be had (${response.status}).`);
	const image = new Image();
	// The content security policy allows pictures as data, which taints no canvas.
	image.src = `data:image/svg+xml;charset=utf-8,${encodeURIComponent(await response.text())}`;
	await image.decode();
	const canvas = document.createElement('canvas');
	canvas.width = image.naturalWidth * SCALE;
	canvas.height = image.naturalHeight * SCALE;
	const context = canvas.getContext('2d');
	if (!context) throw new Error('This browser cannot draw the picture.');
	context.drawImage(image, 0, 0, canvas.width, canvas.height);
	const blob = await new Promise<Blob | null>((resolve) => canvas.toBlob(resolve, 'image/png'));
	if (!blob) throw new Error('This browser cannot make a PNG.');
	const link = document.createElement('a');
	link.href = URL.createObjectURL(blob);
	link.download = name;
	link.click();
	URL.revokeObjectURL(link.href);
}
