import { routes, type RouteName } from './routes'

const patterns = Object.keys(routes).map((name) => {
  const [method = '', path = ''] = name.split(' ')
  const pattern = path.replaceAll('.', '\\.').replaceAll(/:\w+/g, '[^/]+')
  // A literal part goes before a parameter: /api/people/names is not /api/people/:id.
  return { name: name as RouteName, method, pattern: new RegExp(`^${pattern}$`), parameters: path.split(':').length }
}).sort((a, b) => a.parameters - b.parameters)

/** The route of the table that a method and a path (without query) belong to; null where there is none. */
export function matchRoute(method: string, path: string): RouteName | null {
  return patterns.find(each => each.method === method && each.pattern.test(path))?.name ?? null
}

/** The methods that the table has for a path; empty for an address that is none of ours. */
export function methodsOf(path: string): string[] {
  return [...new Set(patterns.filter(each => each.pattern.test(path)).map(({ method }) => method))].sort()
}
