import { BAND_INDEX } from '../../science/bands.js';
import { CLASSES, type StarClass } from '../../science/classes.js';
import { MainSequenceLifetime } from '../../science/main-sequence-lifetime.js';
import type { ClassModel } from '../../science/odds/index.js';

/** Something a star of the sky can be: what is drawn, and which flag it deserves. */
export interface Kind {
  readonly name: string;
  /** '' for the common stars, which deserve none. */
  readonly flag: string;
  /** One entry for each kind of star that belongs here. */
  readonly sources: readonly Source[];
  /** Adds the light of a cool dwarf to the star's own. */
  readonly hasCoolCompanion: boolean;
}

/** A node of the model at one of its branches, and how common it is: field per cubic parsec, cluster in its own unit. */
export interface Source {
  readonly node: number;
  readonly brighter_mag: number;
  readonly fieldDensity: number;
  readonly clusterDensity: number;
}

/** Late enough for the ultracool flag, less half a subtype. */
const FIRST_ULTRACOOL_SUBTYPE = 66.5;
/** Fainter than this no dwarf has evolved off the main sequence. */
const OLDEST_TURNOFF_ABSMAG = 5.5;
/** A companion of the same brightness. */
const EQUAL_PAIR_MAG = 0.7;
/** Above the turn-off by more than a pair of turn-off stars. */
const STRAGGLER_MARGIN_MAG = 0.75;
/** White dwarfs whose cool companion shows in visual light: judgement, about one in ten. */
const COMPANION_SHARE = 0.1;

/** Everything that is drawn in a rehearsal: the flagged kinds, and the common ones that imitate them. */
export function kindsOf(model: ClassModel): readonly Kind[] {
  const turnOff = new MainSequenceLifetime().turnOff_absMagV(model.field.age_Gyr);
  const kind = (
    name: string,
    flag: string,
    belongs: (node: number, brighter_mag: number) => boolean,
    classes: readonly StarClass[],
  ): Kind => ({ name, flag, sources: sourcesOf(model, classes, belongs), hasCoolCompanion: false });
  const absMagV = (node: number) => model.absMag[BAND_INDEX.V][node];
  const isUltracool = (node: number) => model.subtype[node] >= FIRST_ULTRACOOL_SUBTYPE;
  const isCoolPair = (node: number, brighter_mag: number) =>
    brighter_mag > EQUAL_PAIR_MAG && absMagV(node) > OLDEST_TURNOFF_ABSMAG && !isUltracool(node);
  const isPastTurnOff = (node: number) => absMagV(node) < turnOff - STRAGGLER_MARGIN_MAG;
  const whiteDwarfs = sourcesOf(model, ['WD'], () => true);
  const kinds = [
    kind('dwarf', '', (node, gain) => !isUltracool(node) && !isCoolPair(node, gain), ['V']),
    kind('subgiant', '', () => true, ['IV']),
    kind('giant', '', () => true, ['III']),
    kind('bright giant', 'bright-giant', () => true, ['II']),
    kind('supergiant', 'supergiant', () => true, ['Ib', 'Iab', 'Ia']),
    kind('white dwarf', 'white-dwarf', () => true, ['WD']),
    kind('hot subdwarf', 'hot-subdwarf', () => true, ['sdOB']),
    kind('metal-poor subdwarf', 'subdwarf', () => true, ['sd']),
    kind('ultracool dwarf', 'ultracool', isUltracool, ['V']),
    kind('equal pair of cool dwarfs', 'above-main-sequence', isCoolPair, ['V']),
    {
      name: 'white dwarf with a cool dwarf',
      flag: 'between-sequences',
      sources: whiteDwarfs.map(source => ({
        ...source,
        fieldDensity: source.fieldDensity * COMPANION_SHARE,
        clusterDensity: source.clusterDensity * COMPANION_SHARE,
      })),
      hasCoolCompanion: true,
    },
    onlyInCluster(kind('blue straggler', 'blue-straggler', isPastTurnOff, ['V'])),
  ];
  return kinds.filter(({ sources }) =>
    sources.some(source => source.fieldDensity + source.clusterDensity > 0),
  );
}

function onlyInCluster(kind: Kind): Kind {
  return { ...kind, sources: kind.sources.map(source => ({ ...source, fieldDensity: 0 })) };
}

function sourcesOf(
  model: ClassModel,
  classes: readonly StarClass[],
  belongs: (node: number, brighter_mag: number) => boolean,
): readonly Source[] {
  return model.nodes.flatMap((node, k) => {
    if (!classes.includes(CLASSES[node.classIndex])) return [];
    return node.branches
      .filter(({ brighter_mag }) => belongs(k, brighter_mag))
      .map(({ share, brighter_mag }) => ({
        node: k,
        brighter_mag,
        fieldDensity: share * model.fieldDensity[k],
        clusterDensity: share * model.clusterDensity[k],
      }));
  });
}
