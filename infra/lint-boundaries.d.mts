import type { Linter } from 'eslint'

export const boundaries: Linter.Config[]
