/** Jest's global set-up of the projects that need PostgreSQL. */
export { startTestCluster as default } from './test-cluster';
