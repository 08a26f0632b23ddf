// The parts of zod's own entry point, read by file because the package names no address for them one by one.
export * from '../../node_modules/zod/v4/classic/schemas.js';
export * from '../../node_modules/zod/v4/classic/checks.js';
export * from '../../node_modules/zod/v4/classic/errors.js';
export type { infer, input, output } from '../../node_modules/zod/v4/core/index.js';
export { NEVER } from '../../node_modules/zod/v4/core/index.js';
export * as iso from '../../node_modules/zod/v4/classic/iso.js';
export * as coerce from '../../node_modules/zod/v4/classic/coerce.js';
