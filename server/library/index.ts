/** The public file of the library. */
export { Materials } from './materials';
export { Recipes } from './recipes';
export { LibraryRepository } from './library-repository';
export { recipeView } from './library-mapper';
export { mountLibrary } from './library-routes';
