import { describe, expect, it } from 'vitest'
import { shellFiles } from '../../../modules/offline-shell/files'

describe('what a swap page is made of', () => {
  const manifest = {
    'entry.ts': { file: 'entry.js', isEntry: true, imports: ['_vue'], dynamicImports: ['pages/board.vue', 'pages/swaps/[id].vue'], css: ['entry.css'], assets: ['inter.woff2', 'inter.woff'] },
    '_vue': { file: 'vue.js' },
    'pages/board.vue': { file: 'board.js', src: 'pages/board.vue', imports: ['_table'] },
    '_table': { file: 'table.js' },
    'pages/swaps/[id].vue': { file: 'swap.js', src: 'pages/swaps/[id].vue', imports: ['_vue', '_steps'], css: ['swap.css'] },
    '_steps': { file: 'steps.js', imports: ['_words', 'pages/swaps/[id].vue'] },
    '_words': { file: 'words.js' },
    'layouts/default.vue': { file: 'frame.js', src: 'layouts/default.vue' },
  }

  it('is the entry, the swap pages, the frame, and all that they import at once', () => {
    expect(shellFiles(manifest)).toEqual(['entry.css', 'entry.js', 'frame.js', 'inter.woff2', 'steps.js', 'swap.css', 'swap.js', 'vue.js', 'words.js'])
  })

  it('is nothing of a build without an entry', () => {
    expect(shellFiles({})).toEqual([])
  })
})
