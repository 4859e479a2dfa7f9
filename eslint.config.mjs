import { walls } from './eslint.walls.mjs'
import withNuxt from './.nuxt/eslint.config.mjs'

export default withNuxt(
  { ignores: ['server/database/migrations/**', '.data/**'] },
  {
    files: ['**/*.{ts,vue}'],
    rules: {
      '@typescript-eslint/no-explicit-any': 'error',
      '@typescript-eslint/ban-ts-comment': ['error', { 'ts-expect-error': true, 'ts-ignore': true, 'ts-nocheck': true }],
      '@typescript-eslint/no-non-null-assertion': 'error',
      '@typescript-eslint/consistent-type-imports': ['error', { fixStyle: 'separate-type-imports', prefer: 'type-imports', disallowTypeAnnotations: false }],
      'vue/no-v-html': 'error',
      'vue/multi-word-component-names': 'off',
    },
  },
  ...walls,
)
