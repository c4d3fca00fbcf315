import { describe, expect, it } from 'vitest'
import { routes } from '../../../../shared/api/routes'
import { setupFieldNames } from '../../../../shared/settings/fields'
import { moveFieldNames, zoneFieldNames } from '../../../../shared/settings/move-fields'
import { formatErrorCodes } from '../../../../shared/settings/types'
import { byResource, kindWords, routeLine } from '../../../../utils/format-page/interface'
import { curlExample, errorWords, fieldGroups } from '../../../../utils/format-page/rows'

const lineOf = (name: string) => fieldGroups.flatMap(group => group.lines).find(line => line.name === name)

describe('the format page', () => {
  it('shows every field of the tables once', () => {
    const names = fieldGroups.flatMap(group => group.lines.map(line => `${group.section}.${line.name}`))
    expect([...names].sort()).toEqual([...setupFieldNames.map(name => `setup.${name}`), ...moveFieldNames.map(name => `move.${name}`), ...zoneFieldNames.map(name => `zone.${name}`)].sort())
  })
  it('says range, units of both kinds, what else is read, and whether it is needed', () => {
    expect(lineOf('mountingAngle')).toMatchObject({ kind: 'number, -90 to 90', unit: 'deg' })
    expect(lineOf('homingSpeed')).toMatchObject({ unit: 'mm/s / deg/s', also: 'm/s, in/s, rpm, rad/s' })
    expect(lineOf('modulo')).toMatchObject({ kind: 'number, above 0, rotary only' })
    expect(lineOf('nodeAddress')).toMatchObject({ kind: 'whole number, 0 to 65535', unit: '' })
    expect(lineOf('positiveDirection')?.kind).toBe('extend, retract / clockwise, counterclockwise')
    expect(lineOf('target')?.kind).toBe('number, needed')
    expect(lineOf('homeOffset')?.carry).toBe('by the homing method')
  })
  it('explains every error code in a sentence', () => {
    expect(Object.keys(errorWords).sort()).toEqual([...formatErrorCodes].sort())
    for (const words of Object.values(errorWords)) expect(words).toMatch(/\.$/)
  })
  it('shows a command with the token outside of it', () => {
    expect(curlExample('https://marks.larkfield.example')).toContain('"https://marks.larkfield.example/api/uploads?occasion=routine')
    expect(curlExample('x')).not.toMatch(/wm_/)
  })
})

describe('the interface page', () => {
  const lines = Object.entries(routes).map(([name, route]) => routeLine(name, route))

  it('has every route of the table, with what it says', () => {
    expect(lines.map(line => line.name)).toEqual(Object.keys(routes))
    for (const line of lines) expect(line.says).not.toBe('')
    const groups = byResource(lines)
    expect(groups.flatMap(group => group.lines)).toHaveLength(lines.length)
    expect(groups.every(group => group.lines.length > 1)).toBe(true)
  })
  it('names path, query and body, what is needed, and who may', () => {
    const line = lines.find(one => one.name === 'POST /api/versions/:id/known-good')
    expect(line).toMatchObject({ method: 'POST', may: 'planner', signs: true })
    expect(line?.inputs.map(input => [input.where, input.name, input.needed])).toEqual([['path', 'id', true], ['body', 'meaning', true], ['body', 'note', false], ['body', 'password', true]])
  })
  it('says files as files', () => {
    const upload = lines.find(one => one.name === 'POST /api/uploads')
    expect(upload?.inputs.at(-1)).toMatchObject({ where: 'body', name: 'the file' })
    expect(upload?.answers.map(answer => answer.status)).toEqual(['200', '201', '202'])
    expect(lines.find(one => one.name === 'GET /api/tray/:id/file')?.answers).toEqual([{ status: '200', what: 'a file' }])
  })
  it.each([
    [{ type: 'string' }, 'text'], [{ type: 'array', items: { type: 'integer' } }, 'list of whole number'], [{ enum: ['a', 'b'] }, 'one of a, b'],
    [{ anyOf: [{ type: 'number' }, { type: 'null' }] }, 'number or null'], [{ type: 'string', format: 'date-time' }, 'time, RFC 3339'], [{}, 'anything'],
  ])('%j is %s', (node, words) => expect(kindWords(node)).toBe(words))
})
