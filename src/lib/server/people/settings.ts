import { site } from '$lib/strings/site';
import { Setting } from '../db/models/people';
import { inTransaction } from './accounts';
import { recordAudit } from './audit';

/** What an administrator sets on the screen rather than in the environment. */
export interface Settings {
	/** Name of the installation, such as a school's; empty for none. */
	name: string;
	/** Whether visitors may read the table and calculate. */
	tableOpen: boolean;
}

const DEFAULTS: Settings = { name: '', tableOpen: true };

/** The settings in force. Two short rows, read anew each time: no other process can leave an old copy here. */
export async function readSettings(): Promise<Settings> {
	const rows = await Setting.findAll();
	const kept = new Map(rows.map(({ name, value }) => [name, value]));
	return {
		name: kept.get('name') ?? DEFAULTS.name,
		tableOpen: (kept.get('table open') ?? String(DEFAULTS.tableOpen)) === 'true'
	};
}

/** The name under which the installation speaks, as in mail: the product's, with its own where it has one. */
export async function productName(): Promise<string> {
	const { name } = await readSettings();
	return name ? `${site.name} at ${name}` : site.name;
}

/** Changes the settings. */
export async function changeSettings(settings: Settings): Promise<void> {
	const before = await readSettings();
	await inTransaction(async (transaction) => {
		await Setting.upsert({ name: 'name', value: settings.name.trim() }, { transaction });
		await Setting.upsert({ name: 'table open', value: String(settings.tableOpen) }, { transaction });
		const words = ({ name, tableOpen }: Settings) =>
			`"${name}", table ${tableOpen ? 'open to visitors' : 'for people with an account'}`;
		await recordAudit(
			{ action: 'settings changed', detail: `${words(before)} → ${words(settings)}` },
			transaction
		);
	});
}
