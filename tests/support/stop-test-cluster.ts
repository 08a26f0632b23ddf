/** Jest's global tear-down of the projects that need PostgreSQL. */
export default async function stopTestCluster(): Promise<void> {}
