/** Jest's global set-up of the projects that need PostgreSQL. The cluster comes with the launch modules. */
export default async function startTestCluster(): Promise<void> {}
