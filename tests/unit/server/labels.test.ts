import { describe, expect, it } from 'vitest'
import type { Label } from '../../../shared/api/labels'
import { drawLabels } from '../../../server/services/labels/draw-label'
import { readLabels } from '../../../server/services/labels/read-labels'
import { recordLabel } from '../../../server/services/labels/print-label'
import { pageSizes, pdfText, pdfWords, qrOf } from '../../support/paper'
import { openPlant } from '../../support/vault-plant'

const label = (tag: string, more: Partial<Label> = {}): Label => ({ axisId: 1, tag, role: 'seat lid', machine: 'LID-02', line: 'Line 1', falls: true, address: `https://marks.example/axes/${tag}`, printed: null, ...more })
const at = '2026-12-01T06:00:00.000Z'

describe.each([['100x50', 100, 50], ['50x25', 50, 25]] as const)('a label of %s mm', (size, width, height) => {
  it('has its true size, one a page', async () => {
    const pages = pageSizes(await drawLabels([label('LID-02.Z'), label('LID-02.X')], size, at))
    expect(pages).toHaveLength(2)
    for (const [w, h] of pages) {
      expect(w * 25.4 / 72).toBeCloseTo(width, 1)
      expect(h * 25.4 / 72).toBeCloseTo(height, 1)
    }
  })

  it.each(['LID-02.Z', 'JAR-01.W1', 'A', 'A-VERY-LONG-TAG-OF-32-CHARACTERS'])('of %s is read by a camera at 300 dpi and by the eye', async (tag) => {
    const pdf = await drawLabels([label(tag)], size, at)
    expect(qrOf(pdf, 1, 300)).toBe(`https://marks.example/axes/${tag}`)
    expect(pdfText(pdf).replaceAll(/\s/g, '')).toContain(tag)
    expect(pdfText(pdf)).toContain('LID-02, Line 1')
  })
})

describe('a label', () => {
  it('says what can fall, in words where there is room', async () => {
    expect(pdfText(await drawLabels([label('LID-02.Z')], '100x50', at))).toContain('load can fall: block it')
    expect(pdfText(await drawLabels([label('LID-02.Z', { falls: false })], '100x50', at))).not.toContain('fall')
  })

  it('holds no value', async () => {
    const text = pdfText(await drawLabels([label('LID-02.Z')], '100x50', at)).replaceAll(/\s+/g, ' ').trim()
    expect(text).toBe('LID-02.Z seat lid LID-02, Line 1 load can fall: block it Scan before you take it apart.')
  })

  it.each(['100x50', '50x25'] as const)('of %s mm lets no line of long names meet another, and says where they were cut', async (size) => {
    const long = label('SCHLIESSEINHEIT-LINIE-12.ACHSE-Z', { role: 'Schließkraft-Zustellung oben, gefedert, mit Überlastschutz', machine: 'Schließmaschine für Großgläser 12 (Südhalle)', line: 'Glaslinie Süd' })
    const pdf = await drawLabels([long], size, at)
    const lines = [...new Set(pdfWords(pdf, 1).map(({ y }) => Math.floor(y)))].toSorted((a, b) => a - b)
    for (const [index, y] of lines.entries()) if (index > 0) expect(y - (lines[index - 1] ?? 0)).toBeGreaterThan(7)
    const text = pdfText(pdf)
    expect(text.match(/…/g)).toHaveLength(2)
    // Parted where both halves can be written largest.
    expect(text).toContain('SCHLIESSEINHEIT-\n')
  })

  it('is read for an axis or its machine, with the newest print', () => {
    const plant = openPlant()
    const runa = plant.person('Runa Haldersen')
    const z = plant.axis('LID-02.Z', { flags: ['gravity'] })
    plant.axis('LID-02.C')
    const elsewhere = plant.axis('JAR-01.W', { machineId: plant.machineAt('Ostfield').machineId })
    expect(readLabels(plant.vault, runa, z, false, '').labels).toMatchObject([{ tag: 'LID-02.Z', falls: true, address: 'LID-02.Z', printed: null }])
    recordLabel(plant.vault, runa, z, { size: '100x50' })
    recordLabel(plant.vault, runa, z, { size: '50x25' })
    const all = readLabels(plant.vault, runa, z, true, 'https://marks.example')
    expect(all.labels.map(({ tag, printed }) => [tag, printed?.size ?? null])).toEqual([['LID-02.C', null], ['LID-02.Z', '50x25']])
    expect(all.machine.axes).toBe(2)
    expect(readLabels(plant.vault, runa, elsewhere, true, '').labels).toHaveLength(1)
    plant.close()
  })
})
