/** The public file of the studio itself. */
export { mountStudio } from './studio-routes';
export { StudioService } from './studio-service';
export { StudioRepository } from './studio-repository';
