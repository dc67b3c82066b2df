import { readdir, readFile } from 'node:fs/promises'
import path from 'node:path'

const api = path.resolve(import.meta.dirname, '../../app/api')

export interface Route {
  method: string
  /** As the folders are named: `/api/v1/sites/[site]/rooms`. */
  address: string
}

/** Every method of every address of the API, read from the files that make them. The account library has its own test. */
export async function findRoutes(): Promise<Route[]> {
  const files = (await readdir(api, { recursive: true })).filter((file) => /(^|\/)route\.tsx?$/.test(file))
  const routes = await Promise.all(
    files
      .filter((file) => !file.startsWith('auth/'))
      .map(async (file) => {
        const source = await readFile(path.join(api, file), 'utf8')
        const address = path.posix.join('/api', path.posix.dirname(file))
        const exported = source.matchAll(
          /^export (?:const|async function|function) (GET|HEAD|POST|PUT|PATCH|DELETE|OPTIONS)\b/gm,
        )
        return [...exported].map(([, method = '']) => ({ method, address }))
      }),
  )
  return routes.flat().toSorted((a, b) => nameOf(a).localeCompare(nameOf(b)))
}

export const nameOf = ({ method, address }: Route): string => `${method} ${address}`
