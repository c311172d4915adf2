/** Features of the evidence files in words. */
export const featureNames: Record<string, string> = {
	mb2: 'Second mesiobuccal canal (MB2)',
	'middle-mesial': 'Middle mesial canal',
	'middle-distal': 'Middle distal canal',
	'lingual-canal': 'Lingual canal',
	'c-shape': 'C-shaped canal',
	'c-shaped-root': 'C-shaped root',
	'radix-entomolaris': 'Extra distolingual root (radix entomolaris)',
	'radix-paramolaris': 'Extra mesiobuccal root (radix paramolaris)',
	'root-fusion': 'Fused roots',
	'fused-roots': 'Roots fused to one',
	isthmus: 'Isthmus between two canals',
	'intercanal-communication': 'Communication between canals',
	'connecting-canal': 'Connecting canal',
	'lateral-canal': 'Lateral canal',
	'accessory-canal': 'Accessory canal',
	'accessory-foramen': 'Accessory foramen',
	'furcation-canal': 'Canal in the furcation',
	'apical-delta': 'Apical delta',
	'radicular-groove': 'Groove along the root',
	'deep-radicular-groove': 'Deep groove along the root',
	'mesial-invagination': 'Mesial invagination of the root',
	'dens-invaginatus': 'Dens invaginatus'
};

/** The name of a feature; one that has none here is shown as the table writes it. */
export function featureName(id: string): string {
	return featureNames[id] ?? id.replaceAll('-', ' ');
}
