/** Pages of a source that its figures come from; for educators only, since most are under somebody's copyright. */
import { Attachment } from '../db/models/intake';
import { Source } from '../db/models/literature';
import { recordAudit } from '../people/audit';
import { newId, now } from '../people/secrets';
import { storage } from '../storage';
import { checkUpload, harmlessName, type UploadFailure } from '../storage/uploads';
import type { Editor } from './sourceRecords';

const MOST_FILES = 50;

export interface AttachmentDto {
	id: string;
	name: string;
	caption: string;
	type: string;
	bytes: number;
	addedBy: string;
	addedAt: string;
}

const toDto = ({ id, name, caption, type, bytes, addedBy, addedAt }: Attachment): AttachmentDto => ({
	...{ id, name, caption, type, bytes, addedBy, addedAt }
});

/** The files of a source, in the order they came. */
export async function attachmentsOf(sourceId: string): Promise<AttachmentDto[]> {
	const rows = await Attachment.findAll({ where: { sourceId }, order: ['addedAt', 'id'] });
	return rows.map(toDto);
}

/** Attaches a file to a source. Returns why not, where it may not be; null for an unknown source. */
export async function attach(
	editor: Editor,
	sourceId: string,
	file: { name: string; bytes: Buffer },
	caption: string
): Promise<AttachmentDto | { failure: UploadFailure | 'too many' } | null> {
	if (!(await Source.findByPk(sourceId))) return null;
	if ((await Attachment.count({ where: { sourceId } })) >= MOST_FILES) return { failure: 'too many' };
	const checked = await checkUpload(file.bytes);
	if ('failure' in checked) return checked;
	const stored = `${newId()}.${checked.ending}`;
	await storage().put(stored, checked.bytes);
	try {
		return await Attachment.sequelize!.transaction(async (transaction) => {
			const row = await Attachment.create(
				{
					...{ id: newId(), sourceId, stored, type: checked.type, bytes: checked.bytes.length },
					...{ name: harmlessName(file.name), caption: caption.trim(), addedBy: editor.name, addedAt: now() }
				},
				{ transaction }
			);
			const detail = `${row.name}, ${checked.type}`;
			await recordAudit({ action: 'file attached', subject: sourceId, detail }, transaction);
			return toDto(row);
		});
	} catch (error) {
		// Without its row nobody would ever find the file again.
		await storage().remove(stored);
		throw error;
	}
}

/** Opens a file of a source; null if the source has none of this id. */
export async function openAttachment(sourceId: string, id: string) {
	const row = await Attachment.findOne({ where: { id, sourceId } });
	const file = row && (await storage().open(row.stored));
	return file ? { ...toDto(row), stream: file.stream, size: file.bytes } : null;
}

/** Removes a file of a source for good; false if the source has none of this id. */
export async function detach(sourceId: string, id: string): Promise<boolean> {
	const stored = await Attachment.sequelize!.transaction(async (transaction) => {
		const row = await Attachment.findOne({ where: { id, sourceId }, transaction });
		if (!row) return null;
		await row.destroy({ transaction });
		await recordAudit({ action: 'file removed', subject: sourceId, detail: row.name }, transaction);
		return row.stored;
	});
	if (stored === null) return false;
	await storage().remove(stored);
	return true;
}
