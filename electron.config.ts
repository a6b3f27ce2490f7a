import { existsSync } from 'node:fs'
import { resolve } from 'node:path'
import react from '@vitejs/plugin-react'
import type { Configuration } from 'electron-builder'
import type { UserConfig } from 'electron-vite'

/** Where the build goes; the build tool builds beside and renames. */
const out = (part: string) => resolve(process.env.LATCHWRIGHT_OUT ?? 'out', part)

/** Node of the commands and the loopback host; Electron's own is newer. */
const nodeTarget = 'node20'
const browserTarget = 'es2022'

const building: UserConfig = {
  main: {
    build: {
      outDir: out('main'),
      target: nodeTarget,
      rolldownOptions: {
        input: { electron: resolve('main/electron.ts'), headless: resolve('main/headless.ts'), 'compute.worker': resolve('main/usecases/compute.worker.ts') },
        output: { entryFileNames: '[name].js', chunkFileNames: 'chunks/[name]-[hash].js' },
      },
    },
  },
  preload: {
    build: {
      outDir: out('preload'),
      target: nodeTarget,
      externalizeDeps: false,
      rolldownOptions: {
        input: { preload: resolve('main/preload.ts') },
        output: { format: 'cjs', entryFileNames: '[name].cjs' },
      },
    },
  },
  renderer: {
    root: resolve('app'),
    plugins: [react()],
    build: {
      outDir: out('renderer'),
      target: browserTarget,
      minify: true,
      chunkSizeWarningLimit: 4000,
      rolldownOptions: { input: resolve('app/index.html') },
    },
  },
}

/** Packages that are inside the build already, and parts of others that nothing reads at run time. */
const insideTheBuild = [
  'react', 'react-dom', 'react-is', 'recharts', 'immer', 'react-aria-components', 'react-aria', 'react-stately', 'scheduler',
  '@fontsource', '@react-aria', '@react-stately', '@react-types', '@internationalized', '@reduxjs', 'react-redux', 'es-toolkit', 'victory-vendor',
  'dejavu-fonts-ttf', 'pdfmake/build', 'pdfmake/fonts',
]
const iconFile = 'assets/icons/icon.png'
/** A folder with the runtime, for machines that cannot fetch it. */
const electronFolder = process.env.LATCHWRIGHT_ELECTRON_DIST

const fuses: Configuration['electronFuses'] = {
  runAsNode: false, enableNodeOptionsEnvironmentVariable: false, enableNodeCliInspectArguments: false, onlyLoadAppFromAsar: true,
}

const packaging: Configuration = {
  appId: 'org.latchwright.latchwright',
  productName: 'Latchwright',
  copyright: 'The Latchwright authors, MIT licence',
  directories: { output: 'release', buildResources: 'assets' },
  files: ['out/**', 'package.json', 'LICENSE', ...insideTheBuild.map((name) => `!**/node_modules/${name}/**`), '!**/*.map'],
  asar: true,
  npmRebuild: false,
  ...(existsSync(iconFile) && { icon: iconFile }),
  fileAssociations: [{ ext: 'bank.json', name: 'Latchwright plan', role: 'Editor', mimeType: 'application/json' }],
  linux: { target: ['AppImage', 'tar.gz'], category: 'Science', executableName: 'latchwright' },
  win: { target: ['nsis', 'zip'] },
  mac: { target: ['dmg', 'zip'], category: 'public.app-category.developer-tools' },
  ...(electronFolder === undefined
    ? { electronFuses: fuses }
    : { electronDist: electronFolder }),
}

/** electron-vite calls this with a command, electron-builder without one. */
export default function configuration(asked?: { command?: string }): UserConfig | Configuration {
  return asked?.command ? building : packaging
}
