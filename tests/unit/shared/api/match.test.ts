import { describe, expect, it } from 'vitest'
import { matchRoute, methodsOf } from '../../../../shared/api/match'
import { routes } from '../../../../shared/api/routes'

describe('matching a route', () => {
  it('finds each by its own address', () => {
    for (const name of Object.keys(routes)) {
      const [method = '', path = ''] = name.split(' ')
      expect(matchRoute(method, path.replaceAll(/:\w+/g, '7')), name).toBe(name)
    }
  })

  it('takes a literal part before a parameter', () => {
    expect(matchRoute('GET', '/api/people/names')).toBe('GET /api/people/names')
    expect(matchRoute('PATCH', '/api/people/7')).toBe('PATCH /api/people/:id')
    expect(matchRoute('GET', '/api/axes/tag:LID-02.Z')).toBe('GET /api/axes/:id')
  })

  it('finds nothing for what is none', () => {
    for (const path of ['/api', '/api/', '/api/sites/', '/api/sites/1/2', '/api/openapiXjson', '/sites']) expect(matchRoute('GET', path), path).toBeNull()
    expect(matchRoute('DELETE', '/api/sites/1')).toBeNull()
  })

  it('says which methods an address has', () => {
    expect(methodsOf('/api/sites')).toEqual(['GET', 'POST'])
    expect(methodsOf('/api/sites/1')).toEqual(['GET', 'PATCH'])
    expect(methodsOf('/api/nothing')).toEqual([])
  })
})
