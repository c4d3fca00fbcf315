import { describe, expect, it } from 'vitest'
import { findHeader } from '../../../../shared/settings/csv-header'

const names = ['section', 'row', 'field', 'value', 'unit']
const header = (delimiter: string) => names.join(delimiter)

describe('findHeader', () => {
  it.each([',', ';', '\t'] as const)('takes the five names parted by %j', (delimiter) => {
    const text = `${header(delimiter)}\nunit`
    expect(findHeader(text)).toEqual({ delimiter, header: 0, body: header(delimiter).length + 1 })
  })

  it('does not mind case, outer spaces, quotes and empty cells behind', () => {
    for (const line of ['Section,ROW,field,Value,unit', ' section , row,field ,value, unit ', '"section","row","field","value","unit"', 'section,row,field,value,unit,,']) {
      expect(findHeader(`${line}\n`)?.delimiter).toBe(',')
    }
  })

  it('passes a sep line over, and holds the header to it', () => {
    expect(findHeader(`sep=;\n${header(';')}\nx`)).toEqual({ delimiter: ';', header: 6, body: 6 + header(';').length + 1 })
    expect(findHeader(`SEP=,\n${header(',')}`)?.delimiter).toBe(',')
    expect(findHeader(`"sep=;"\n${header(';')}`)?.delimiter).toBe(';')
    expect(findHeader(`sep=\t\n${header('\t')}`)?.delimiter).toBe('\t')
    expect(findHeader(`sep=;\n${header(',')}`)).toBeUndefined()
    expect(findHeader(`sep=|\n${header('|')}`)).toBeUndefined()
    expect(findHeader('sep=;\n')).toBeUndefined()
  })

  it('passes empty lines before it over', () => {
    expect(findHeader(`\n\n${header(',')}\n`)).toMatchObject({ header: 2 })
  })

  it.each(['', '\n', 'section,row,field,value', 'section,row,field,value,unit,more', 'section,field,row,value,unit', header('|'), header(' '), `x\n${header(',')}`, 'section;row,field;value,unit'])(
    'finds none in %j', text => expect(findHeader(text)).toBeUndefined())

  it('ends the file without a line end too', () => {
    expect(findHeader(header(','))).toEqual({ delimiter: ',', header: 0, body: header(',').length })
  })
})
