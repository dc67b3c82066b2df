import type { TestProject } from 'vitest/node'
import { startTestCluster } from './cluster'
import { makeTemplate } from './template'

declare module 'vitest' {
  export interface ProvidedContext {
    /** The PostgreSQL of this run of the project `integration`. */
    databaseAdminUrl: string
  }
}

export default async function setup(project: TestProject): Promise<() => Promise<void>> {
  const cluster = await startTestCluster()
  try {
    await makeTemplate(cluster.adminUrl)
  } catch (error) {
    await cluster.stop()
    throw error
  }
  project.provide('databaseAdminUrl', cluster.adminUrl)
  return () => cluster.stop()
}
