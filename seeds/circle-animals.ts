/**
 * Bands set by the invented circle (no published transport bands exist; a real circle asks its veterinarian). The own
 * outdoor limits only tighten the circle's guard rails.
 */
export const species = [
  {
    commonName: 'corn snake',
    scientificName: 'Pantherophis guttatus',
    band: [60, 86],
    endurance: [48, 92],
    outdoor: [null, null],
    massG: 160,
  },
  {
    commonName: 'ball python',
    scientificName: 'Python regius',
    band: [66, 88],
    endurance: [55, 93],
    outdoor: [40, null],
    massG: 450,
  },
  {
    commonName: 'crested gecko',
    scientificName: 'Correlophus ciliatus',
    band: [60, 80],
    endurance: [50, 85],
    outdoor: [null, 84],
    massG: 35,
  },
  {
    commonName: 'leopard gecko',
    scientificName: 'Eublepharis macularius',
    band: [62, 88],
    endurance: [50, 94],
    outdoor: [null, null],
    massG: 55,
  },
  {
    commonName: 'bearded dragon',
    scientificName: 'Pogona vitticeps',
    band: [64, 90],
    endurance: [52, 96],
    outdoor: [null, null],
    massG: 250,
  },
  {
    commonName: 'boa',
    scientificName: 'Boa constrictor',
    band: [66, 88],
    endurance: [55, 93],
    outdoor: [40, null],
    massG: 900,
  },
  {
    commonName: 'kingsnake',
    scientificName: 'Lampropeltis getula',
    band: [60, 86],
    endurance: [48, 92],
    outdoor: [null, null],
    massG: 220,
  },
  {
    commonName: 'blue-tongued skink',
    scientificName: 'Tiliqua scincoides',
    band: [64, 88],
    endurance: [52, 94],
    outdoor: [null, null],
    massG: 380,
  },
] as const;

export const boxes = [
  { name: 'Small box', lengthIn: 12, widthIn: 9, heightIn: 6, foamIn: 0.75 },
  { name: 'Medium box', lengthIn: 12, widthIn: 12, heightIn: 10, foamIn: 0.75 },
  { name: 'Large box', lengthIn: 16, widthIn: 12, heightIn: 12, foamIn: 1 },
] as const;
