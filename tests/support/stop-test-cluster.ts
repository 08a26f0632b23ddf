/** Jest's global tear-down of the projects that need PostgreSQL. */
export { stopTestCluster as default } from './test-cluster';
