/** A craft as every installation starts with it; the studio may add its own. */
export interface Craft {
  readonly key: string;
  readonly name: string;
}

/** The crafts of a workshop that makes sculptural props and scenery. */
export const CRAFTS = [
  { key: 'design', name: 'Design & drawing' },
  { key: 'carving', name: 'Carving' },
  { key: 'metalwork', name: 'Metalwork' },
  { key: 'woodwork', name: 'Woodwork' },
  { key: 'moulding', name: 'Moulding' },
  { key: 'laminating', name: 'Laminating' },
  { key: 'casting', name: 'Casting' },
  { key: 'filling-sanding', name: 'Filling & sanding' },
  { key: 'painting', name: 'Painting' },
  { key: 'soft-finishing', name: 'Soft finishing' },
  { key: 'electrics-pneumatics', name: 'Electrics & pneumatics' },
  { key: 'transport', name: 'Transport' },
] as const satisfies readonly Craft[];

/** Key of a craft that every installation starts with. */
export type CraftKey = (typeof CRAFTS)[number]['key'];

/** Whether `key` may name a craft: lower-case words joined by hyphens, 40 characters at most. */
export function isCraftKey(key: string): boolean {
  return /^[a-z][a-z0-9-]{0,39}$/.test(key);
}
