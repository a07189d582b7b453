import { readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { ESLint, Linter } from 'eslint'
import tseslint from 'typescript-eslint'
import { describe, expect, it } from 'vitest'
import { projectRoot } from '#server/config'
import { arrows } from '../../eslint.arrows.js'

const linter = new Linter({ cwd: projectRoot })

function complaints(file: string, code: string): string[] {
  const config: Linter.Config = {
    files: ['**/*.{ts,tsx}'],
    languageOptions: { parser: tseslint.parser as Linter.Parser },
    plugins: { quarterload: arrows },
    rules: { 'quarterload/arrows': 'error' },
  }
  return linter.verify(code, config, { filename: path.join(projectRoot, file) }).map((message) => message.message)
}

/** What the message must tell the person: where the code belongs. */
const mustFail: Record<string, RegExp> = {
  'src/features/presses/other-feature.ts': /move what several features need to src\/components .* src\/lib/,
  'src/features/presses/server.ts': /what both need belongs in shared/,
  'src/components/feature.ts': /pass it in as a prop, or move the component into the feature/,
  'src/lib/component.ts': /move this to src\/components/,
  'src/routes/router.ts': /pass what is needed down as an argument/,
  'server/services/http.ts': /do this in server\/routes/,
  'server/routes/database.ts': /reading and writing belongs in server\/services/,
  'server/ledger/service.ts': /services call it, never the other way round/,
  'server/models/writer.ts': /put this in server\/services or server\/ledger/,
  'shared/platform.ts': /keep this in src or server/,
  'shared/server.ts': /keep this in src or server/,
}

const fixtures = path.join(projectRoot, 'fixtures/architecture')

describe('an import against the arrows', () => {
  it.each(Object.entries(mustFail))('%s is refused, with where the code belongs', (file, advice) => {
    const said = complaints(file, readFileSync(path.join(fixtures, file), 'utf8'))
    expect(said).toHaveLength(1)
    expect(said[0]).toMatch(advice)
  })

  it('has a fixture for each case, and each fixture a case', () => {
    const files = readdirSync(fixtures, { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile())
      .map((entry) => path.relative(fixtures, path.join(entry.parentPath, entry.name)))
    expect(files.sort()).toEqual(Object.keys(mustFail).sort())
  })
})

describe('an import along the arrows', () => {
  it.each([
    ['src/routes/press-page.tsx', '../features/presses/press-page'],
    ['src/features/presses/press-page.tsx', './press-card'],
    ['src/features/presses/press-page.tsx', '../../components/button'],
    ['src/features/presses/press-page.tsx', '#shared/units'],
    ['src/components/link.tsx', '../paths'],
    ['src/main.tsx', './router'],
    ['server/routes/presses.ts', '../services/presses'],
    ['server/services/presses.ts', '../ledger/append'],
    ['server/services/presses.ts', '../problem'],
    ['server/ledger/append.ts', '../models'],
    ['server/app.ts', './routes/presses'],
    ['shared/press/decide.ts', 'zod'],
    ['shared/press/decide.ts', '@noble/hashes/sha2.js'],
    ['shared/press/decide.test.ts', 'vitest'],
  ])('is let through: %s → %s', (file, specifier) => {
    expect(complaints(file, `import '${specifier}'\n`)).toEqual([])
  })
})

describe('the lint settings', () => {
  it.each(['src/main.tsx', 'server/app.ts', 'shared/policy.ts'])('enforce the arrows in %s', async (file) => {
    const config = (await new ESLint({ cwd: projectRoot }).calculateConfigForFile(path.join(projectRoot, file))) as {
      rules?: Record<string, unknown>
    }
    expect(config.rules?.['quarterload/arrows']).toEqual([2])
  })
})
