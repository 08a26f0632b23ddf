import type { DemoMaterial } from './demo-material';
import { COATINGS } from './materials-coatings';
import { MOULDING_MATERIALS } from './materials-moulding';
import { RESINS } from './materials-resins';

/**
 * The library that every installation starts with: generic materials, with figures to be overwritten from the sheets of the
 * products in use. Hours at 20 °C and 50 % humidity.
 */
export const MATERIALS: readonly DemoMaterial[] = [...RESINS, ...MOULDING_MATERIALS, ...COATINGS];
