import type { FamilyId } from '$trade/metal/families.ts';

/** The colour families of the mark's own alloys, as labels of a picture. */
export const familyWords: Readonly<Record<FamilyId, string>> = {
	yellow: 'marked, yellow',
	red: 'marked, red',
	green: 'marked, green',
	'white-nickel': 'white, nickel',
	'white-palladium': 'white, palladium',
	silver: 'as marked',
	platinum: 'as marked',
	palladium: 'as marked'
};
