import { readFileSync } from 'node:fs'
import path from 'node:path'
import { Resvg } from '@resvg/resvg-js'
import type { Plugin } from 'vite'
import { VitePWA } from 'vite-plugin-pwa'
import { pruneFormerBuilds } from './former-builds.ts'

/** The deep dye of the mark's own ground, and the dye of the product's: LOOK, colours. */
const DEEP_DYE = '#0D1D4B'
const DYE = '#142A66'

/** `inset`: the part of each side that a round mask may cut off, so that the mark stands clear of it. */
const ICONS = [
  { file: 'icon-192.png', size: 192, inset: 0, purpose: 'any' },
  { file: 'icon-512.png', size: 512, inset: 0, purpose: 'any' },
  { file: 'icon-mask-512.png', size: 512, inset: 0.14, purpose: 'maskable' },
  { file: 'icon-180.png', size: 180, inset: 0, purpose: null },
] as const

/** The product's mark as a picture of so many pixels; its ground reaches the edge whatever the inset. */
function drawMark(svg: string, size: number, inset: number): Buffer {
  const inner = svg.replace(/^<svg[^>]*>/, '').replace(/<\/svg>\s*$/, '')
  const scale = 1 - 2 * inset
  const drawn = `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 40 40"><rect width="40" height="40" fill="${DEEP_DYE}"/><g transform="translate(${40 * inset} ${40 * inset}) scale(${scale})">${inner}</g></svg>`
  return new Resvg(drawn, { fitTo: { mode: 'width', value: size } }).render().asPng()
}

/** Draws the icons of the installed app from the one mark there is. */
function icons(): Plugin {
  return {
    name: 'quarterload-icons',
    apply: 'build',
    generateBundle() {
      const svg = readFileSync('src/mark.svg', 'utf8')
      for (const { file, size, inset } of ICONS) this.emitFile({ type: 'asset', fileName: file, source: drawMark(svg, size, inset) })
    },
  }
}

/** What this build consists of; files of former builds lie beside it. */
class ThisBuild {
  readonly files = new Set<string>()

  plugin(): Plugin {
    let outDir = 'dist'
    return {
      name: 'quarterload-former-builds',
      apply: 'build',
      configResolved: (config) => {
        outDir = path.resolve(config.root, config.build.outDir)
      },
      writeBundle: (_options, bundle) => {
        for (const file of Object.keys(bundle)) this.files.add(file)
        const assets = new Set([...this.files].filter((file) => file.startsWith('assets/')).map((file) => file.slice('assets/'.length)))
        pruneFormerBuilds(path.join(outDir, 'assets'), assets, Date.now())
      },
    }
  }
}

/**
 * What makes the built client open without a network: a service worker that keeps the page, every chunk and the fonts
 * of this build, a manifest and icons. The worker takes over when the page asks it to (src/lib/new-version.ts) or when
 * the last page is closed, never by itself. It answers for nothing but the page and its files: /api and /tag go to the
 * network as if it weren't there.
 */
export function offlineClient() {
  const thisBuild = new ThisBuild()
  return [
    icons(),
    thisBuild.plugin(),
    VitePWA({
      strategies: 'generateSW',
      registerType: 'prompt',
      injectRegister: false,
      filename: 'sw.js',
      manifestFilename: 'manifest.webmanifest',
      manifest: {
        id: '/',
        name: 'Quarterload',
        short_name: 'Quarterload',
        description: 'Takes a shop-built hydraulic press through its first load, by quarters, and keeps the record.',
        lang: 'en',
        start_url: '/',
        scope: '/',
        display: 'standalone',
        theme_color: DEEP_DYE,
        background_color: DYE,
        icons: ICONS.flatMap(({ file, size, purpose }) =>
          purpose === null ? [] : [{ src: `/${file}`, sizes: `${size}x${size}`, type: 'image/png', purpose }],
        ),
      },
      includeManifestIcons: false,
      workbox: {
        globPatterns: ['index.html', '*.png', 'manifest.webmanifest', 'assets/*.{js,css,woff2,woff,svg,png}'],
        // Whatever is not of this build stays for pages of former ones, and is none of the new worker's business.
        manifestTransforms: [
          (entries) => ({ manifest: entries.filter(({ url }) => !url.startsWith('assets/') || thisBuild.files.has(url)), warnings: [] }),
        ],
        dontCacheBustURLsMatching: /^assets\//,
        maximumFileSizeToCacheInBytes: 8 * 1024 * 1024,
        inlineWorkboxRuntime: true,
        sourcemap: false,
        skipWaiting: false,
        clientsClaim: false,
        navigateFallback: '/index.html',
        navigateFallbackDenylist: [/^\/api(\/|$)/, /^\/tag(\/|$)/],
      },
    }),
  ]
}
