/**
 * Country names of the codes that samples carry. ISO 3166-1 alpha-3, as the table has them, against the alpha-2 that `Intl.DisplayNames`
 * wants: all 249 as the iso-codes project (4.15) and pycountry (26.2) list them, which agree. XKX is Kosovo by custom.
 */
const CODES = `
	ABWAW AFGAF AGOAO AIAAI ALAAX ALBAL ANDAD AREAE ARGAR ARMAM ASMAS ATAAQ ATFTF ATGAG AUSAU AUTAT AZEAZ
	BDIBI BELBE BENBJ BESBQ BFABF BGDBD BGRBG BHRBH BHSBS BIHBA BLMBL BLRBY BLZBZ BMUBM BOLBO BRABR BRBBB
	BRNBN BTNBT BVTBV BWABW CAFCF CANCA CCKCC CHECH CHLCL CHNCN CIVCI CMRCM CODCD COGCG COKCK COLCO COMKM
	CPVCV CRICR CUBCU CUWCW CXRCX CYMKY CYPCY CZECZ DEUDE DJIDJ DMADM DNKDK DOMDO DZADZ ECUEC EGYEG ERIER
	ESHEH ESPES ESTEE ETHET FINFI FJIFJ FLKFK FRAFR FROFO FSMFM GABGA GBRGB GEOGE GGYGG GHAGH GIBGI GINGN
	GLPGP GMBGM GNBGW GNQGQ GRCGR GRDGD GRLGL GTMGT GUFGF GUMGU GUYGY HKGHK HMDHM HNDHN HRVHR HTIHT HUNHU
	IDNID IMNIM INDIN IOTIO IRLIE IRNIR IRQIQ ISLIS ISRIL ITAIT JAMJM JEYJE JORJO JPNJP KAZKZ KENKE KGZKG
	KHMKH KIRKI KNAKN KORKR KWTKW LAOLA LBNLB LBRLR LBYLY LCALC LIELI LKALK LSOLS LTULT LUXLU LVALV MACMO
	MAFMF MARMA MCOMC MDAMD MDGMG MDVMV MEXMX MHLMH MKDMK MLIML MLTMT MMRMM MNEME MNGMN MNPMP MOZMZ MRTMR
	MSRMS MTQMQ MUSMU MWIMW MYSMY MYTYT NAMNA NCLNC NERNE NFKNF NGANG NICNI NIUNU NLDNL NORNO NPLNP NRUNR
	NZLNZ OMNOM PAKPK PANPA PCNPN PERPE PHLPH PLWPW PNGPG POLPL PRIPR PRKKP PRTPT PRYPY PSEPS PYFPF QATQA
	REURE ROURO RUSRU RWARW SAUSA SDNSD SENSN SGPSG SGSGS SHNSH SJMSJ SLBSB SLESL SLVSV SMRSM SOMSO SPMPM
	SRBRS SSDSS STPST SURSR SVKSK SVNSI SWESE SWZSZ SXMSX SYCSC SYRSY TCATC TCDTD TGOTG THATH TJKTJ TKLTK
	TKMTM TLSTL TONTO TTOTT TUNTN TURTR TUVTV TWNTW TZATZ UGAUG UKRUA UMIUM URYUY USAUS UZBUZ VATVA VCTVC
	VENVE VGBVG VIRVI VNMVN VUTVU WLFWF WSMWS YEMYE ZAFZA ZMBZM ZWEZW
	XKXXK`;

const alpha2 = new Map(
	CODES.trim()
		.split(/\s+/)
		.map((pair) => [pair.slice(0, 3), pair.slice(3)])
);
const names = new Intl.DisplayNames('en', { type: 'region' });

/** Name of one country; a code nobody knows stays as it is. */
const nameOf = (code: string): string => {
	const two = alpha2.get(code);
	return two === undefined ? code : (names.of(two) ?? code);
};

/**
 * The countries of a sample in words: `BRA+TUR` is "Brazil and Türkiye", `multi` "several countries".
 *
 * @param code ISO 3166-1 alpha-3, several joined by `+`, or `multi`; empty where the source does not say
 */
export function countryName(code: string): string {
	if (code === 'multi') return 'several countries';
	const countries = code.split('+').map(nameOf);
	return new Intl.ListFormat('en', { type: 'conjunction' }).format(countries);
}

/** Codes of the countries with a word of their name that begins so, however it is accented: `saudi` finds SAU. */
export function countriesNamed(beginning: string): string[] {
	const fold = (text: string) => text.normalize('NFD').replace(/\p{M}/gu, '').toLowerCase();
	const wanted = fold(beginning);
	return [...alpha2.keys()].filter((code) =>
		fold(nameOf(code))
			.split(/[^\p{L}]+/u)
			.some((word) => word.startsWith(wanted))
	);
}

/** Whether a code is a country's own, ISO 3166-1 alpha-3 or XKX. */
export const isCountryCode = (code: string): boolean => alpha2.has(code);

/** Languages of dental literature, whose own names of countries people type: `Brasil`, `Deutschland`. */
const LANGUAGES = ['en', 'es', 'pt', 'fr', 'de', 'it', 'tr', 'nl', 'pl', 'id'];
/** Names that no list of ISO names has. */
const EVERYDAY: Record<string, readonly string[]> = {
	ARE: ['UAE', 'Emirates'],
	GBR: ['UK', 'England', 'Scotland', 'Wales', 'Great Britain'],
	KOR: ['Korea'],
	MMR: ['Burma'],
	NLD: ['Holland'],
	TUR: ['Turkey'],
	USA: ['America', 'United States of America']
};

/** Names by which people may ask for one country, in several languages, its code among them. */
export function everyNameOf(code: string): string[] {
	const two = alpha2.get(code);
	if (two === undefined) return [code];
	const inLanguages = LANGUAGES.flatMap(
		(language) => new Intl.DisplayNames(language, { type: 'region' }).of(two) ?? []
	);
	return [...new Set([...inLanguages, ...(EVERYDAY[code] ?? []), code])];
}
