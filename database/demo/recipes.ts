import { CAST_BRACKETS, CONCRETE_BASIN, RELIEF, RESIN_CASTS } from './recipes-casts';
import { BACKCLOTH, PAPER_FIGURE, ROSTRUM, UPHOLSTERED } from './recipes-frames';
import { CARVED_SHELL, FLOWN, REFURBISHED } from './recipes-shells';

/** The recipes that every installation starts with. Hours are usual practice, to be bettered by what the studio records. */
export const RECIPES = [
  CARVED_SHELL,
  FLOWN,
  REFURBISHED,
  CAST_BRACKETS,
  RESIN_CASTS,
  RELIEF,
  CONCRETE_BASIN,
  ROSTRUM,
  UPHOLSTERED,
  BACKCLOTH,
  PAPER_FIGURE,
] as const;
