import type { ESLint } from 'eslint'

export const arrows: ESLint.Plugin
