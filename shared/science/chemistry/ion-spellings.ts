/**
 * Other ways to write an ion. `stems` take the endings of its English name in English, German, Norwegian, French, Spanish and Italian;
 * `words` are whole names; `bodies` are other formulas without charge. Lower case, without accents, spaces and hyphens. Common practice.
 */
export interface Spelling {
  stems?: string
  words?: string
  bodies?: string
}

export const endings: Readonly<Record<string, readonly string[]>> = {
  ate: ['ate', 'at', 'ato'],
  ide: ['ide', 'id', 'ure', 'uro'],
  ite: ['ite', 'it', 'itt', 'ito'],
}

export const anionSpellings: Readonly<Record<string, Spelling>> = {
  'CO3^2-': { stems: 'karbon' },
  'SO4^2-': { stems: 'sulph solf' },
  'H2PO4^-': { stems: 'dihydrogenfosf dihydrogenophosph dihidrogenofosf dihydrogenorthophosph' },
  'Cl^-': { words: 'klorid cloruro hydrochloride hydrochlorid chlorhydrate' },
  'I^-': { words: 'jodid yoduro ioduro' },
  'ClO4^-': { stems: 'perklor perclor' },
  'SCN^-': { stems: 'tiocyan tiocian sulfocyan', words: 'rhodanide rhodanid rodanid rhodanure', bodies: 'NCS CNS' },
  'PO4^3-': { stems: 'fosf orthophosph' },
  'HPO4^2-': { stems: 'hydrogenfosf hydrogenophosph hidrogenofosf monohydrogenphosph monohydrogenfosf hydrogenorthophosph' },
  'HCO3^-': { stems: 'hydrogenkarbon hydrogenocarbon hidrogenocarbon bicarbon bikarbon' },
  'CH3CO2^-': { stems: 'azet', words: 'ethanoate', bodies: 'CH3COO C2H3O2 OAc AcO Ac' },
  'HCO2^-': { stems: 'formi', words: 'methanoate', bodies: 'HCOO CHO2' },
  'C6H5O7^3-': { stems: 'zitr sitr', bodies: 'Cit' },
  'C4H4O6^2-': { bodies: 'C4O6H4' },
  'C2O4^2-': { stems: 'oksal' },
  'S2O3^2-': { stems: 'thiosulph tiosulf' },
  'SO3^2-': { stems: 'sulph' },
  'HSO3^-': { stems: 'hydrogensulph hydrogenosulf hidrogenosulf bisulf bisulph' },
  'HSO4^-': { stems: 'hydrogensulph hydrogenosulf hidrogenosulf bisulf bisulph' },
  'S2O8^2-': { stems: 'persulf persulph peroxydisulf peroksodisulf' },
  'N3^-': { words: 'azoture azida acid' },
  'OH^-': { words: 'hydroxyde hidroxido hydroksid' },
  'CN^-': { words: 'cianuro' },
  'OCN^-': { words: 'cianato', bodies: 'NCO CNO' },
  'ClO^-': { stems: 'hypoklor hipoclor', bodies: 'OCl' },
  'ClO2^-': { words: 'klorit kloritt clorito' },
  'ClO3^-': { words: 'klorat clorato' },
  'IO3^-': { stems: 'jod yod' },
  'IO4^-': { stems: 'perjod peryod metaperiod' },
  'I3^-': { stems: 'trijod triyod' },
  'CrO4^2-': { stems: 'krom crom' },
  'Cr2O7^2-': { stems: 'dikrom dicrom bichrom' },
  'WO4^2-': { stems: 'wolfram' },
  'B(OH)4^-': { bodies: 'BOH4 H4BO4' },
  'BF4^-': { stems: 'tetrafluorbor fluorobor fluobor' },
  'PF6^-': { stems: 'hexafluorphosph hexafluorofosf heksafluorofosf heksafluorfosf' },
  'B(C6H5)4^-': { bodies: 'BPh4' },
  'CF3SO3^-': { stems: 'trifluoromethanesulfon trifluormethansulfon', bodies: 'OTf TfO' },
  'CF3CO2^-': { stems: 'trifluoracet', bodies: 'CF3COO' },
  'CCl3CO2^-': { stems: 'trichloracet', bodies: 'CCl3COO' },
  'C7H5O2^-': { bodies: 'C6H5COO C6H5CO2' },
  'C7H5O3^-': { bodies: 'C6H4OHCOO HOC6H4COO' },
  'Fe(CN)6^3-': { words: 'ferricyanide hexacyanoferrat#3' },
  'Fe(CN)6^4-': { words: 'ferrocyanide hexacyanoferrat#2' },
}

export const cationSpellings: Readonly<Record<string, Spelling>> = {
  'Na^+': { words: 'natrium sodio sodique' },
  'K^+': { words: 'kalium potasio potassique' },
  'Li^+': { words: 'litium litio' },
  'Rb^+': { words: 'rubidio' },
  'Cs^+': { words: 'cesium casium zasium cesio' },
  'NH4^+': { words: 'amonio' },
  'N(CH3)4^+': { words: 'tetrametylammonium tetramethylamonio', bodies: 'NMe4 Me4N (CH3)4N TMA' },
  'N(C2H5)4^+': { words: 'tetraetylammonium', bodies: 'NEt4 Et4N (C2H5)4N' },
  'N(C3H7)4^+': { bodies: 'NPr4 Pr4N (C3H7)4N' },
  'N(C4H9)4^+': { words: 'tetrabutylamonio', bodies: 'NBu4 Bu4N (C4H9)4N TBA' },
  'C(NH2)3^+': { words: 'guanidine guanidin guanidina guanidinio', bodies: 'CH6N3 CN3H6 Gdm Gdn Gnd Gu Gua GdmH GdnH GuH GuaH' },
  'Mg^2+': { words: 'magnesio' },
  'Ca^2+': { words: 'kalzium kalsium calcio calcique' },
  'Sr^2+': { words: 'estroncio' },
  'Ba^2+': { words: 'baryum bario' },
  'Zn^2+': { words: 'zink sink cinc' },
  'Mn^2+': { words: 'manganese mangan manganeso' },
  'Co^2+': { words: 'cobalt kobalt cobalto' },
  'Ni^2+': { words: 'nickel nikkel niquel' },
  'Cu^2+': { words: 'copper kupfer kobber cuivre cobre cupric kupfer#2' },
  'Cu^+': { words: 'cuprous kupfer#1' },
  'Cd^2+': { words: 'kadmium cadmio' },
  'Fe^2+': { words: 'ferrous eisen#2 jern#2 fer#2' },
  'Fe^3+': { words: 'ferric eisen#3 jern#3 fer#3' },
  'Ag^+': { words: 'silber solv argent plata' },
  'Al^3+': { words: 'aluminum aluminio' },
  'La^3+': { words: 'lanthan lanthane lantan lantano' },
}
