/**
 * What `import { z } from 'zod'` means in the browser's build (client/tsconfig.json maps it here): zod without its sentences in
 * forty languages and its JSON Schema reader. The bundler can't leave them out by itself, because `z` is one namespace object
 * that every contract uses; they were a third of what a phone loads first.
 */
import * as z from './parts';

export { z };
