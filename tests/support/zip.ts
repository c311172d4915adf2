interface Part {
	name: string;
	/** The content, deflated without a header. */
	packed: Buffer;
	/** How large the directory says that it is; may be a lie. */
	size: number;
}

/** A zip archive (APPNOTE.TXT 4.3) of parts that are packed already, so that a test can have its directory lie. */
export function zipOf(parts: readonly Part[]): Buffer {
	const locals: Buffer[] = [];
	const directory: Buffer[] = [];
	let at = 0;
	for (const { name, packed, size } of parts) {
		const common = Buffer.alloc(26);
		common.writeUInt16LE(20, 0); // version needed
		common.writeUInt16LE(8, 4); // deflated
		common.writeUInt32LE(packed.length, 14);
		common.writeUInt32LE(size, 18);
		common.writeUInt16LE(name.length, 22);
		const local = Buffer.concat([Buffer.from('PK\x03\x04', 'latin1'), common, Buffer.from(name), packed]);
		const entry = Buffer.alloc(14);
		entry.writeUInt32LE(at, 10);
		directory.push(
			Buffer.concat([Buffer.from('PK\x01\x02\x14\x00', 'latin1'), common, entry, Buffer.from(name)])
		);
		locals.push(local);
		at += local.length;
	}
	const listed = Buffer.concat(directory);
	const end = Buffer.alloc(18);
	end.writeUInt16LE(parts.length, 4);
	end.writeUInt16LE(parts.length, 6);
	end.writeUInt32LE(listed.length, 8);
	end.writeUInt32LE(at, 12);
	return Buffer.concat([...locals, listed, Buffer.from('PK\x05\x06', 'latin1'), end]);
}
