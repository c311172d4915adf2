/** From what somebody typed, pasted or looked up to the form of a new source. */
import type { Sequelize } from 'sequelize';
import type { SourceFields } from '$lib/schemas/sources';
import { findDuplicates, type Duplicate } from './duplicates';
import type { RetractionNotice } from './doi';
import type { CslSource } from './literatureFiles';
import { fieldsOf } from './sourceFields';

/** A source that is not saved yet. */
export interface SourceProposal {
	fields: SourceFields;
	duplicates: Duplicate[];
	retraction: RetractionNotice | null;
}

/** The form of a citation that was found, with what speaks against saving it. */
export async function proposeSource(
	db: Sequelize,
	csl: CslSource,
	retraction: RetractionNotice | null = null
): Promise<SourceProposal> {
	return { fields: fieldsOf(csl), duplicates: await findDuplicates(db, csl), retraction };
}
