import { readFileSync } from 'node:fs'
import { join } from 'node:path'
import { gzipSync } from 'node:zlib'

const PUBLIC = '.output/public'

/** What a page sends for its first load: every script that its HTML names, and what those import, gzipped, in kB (1,000 bytes). */
export function firstLoadOf(html: string): { kB: number, files: string[] } {
  const seen = new Set<string>()
  const waiting = [...html.matchAll(/<(?:script[^>]*src|link[^>]*rel="modulepreload"[^>]*href)="(\/_nuxt\/[^"]+\.js)"/g)].map(match => match[1] ?? '')
  for (let file = waiting.pop(); file !== undefined; file = waiting.pop()) {
    if (seen.has(file)) continue
    seen.add(file)
    // Only what is imported at once: what `import()` asks for later is not part of the first load.
    for (const [, name] of read(file).matchAll(/(?:from|import)"\.\/([\w-]+\.js)"/g)) waiting.push(`/_nuxt/${name}`)
  }
  const bytes = [...seen].map(file => gzipSync(read(file)).length).reduce((sum, size) => sum + size, 0)
  return { kB: bytes / 1000, files: [...seen] }
}

function read(file: string): string {
  return readFileSync(join(PUBLIC, file), 'utf8')
}
