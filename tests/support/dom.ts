import '@testing-library/jest-dom/vitest'
import { cleanup, configure } from '@testing-library/react'
import { afterEach } from 'vitest'

// A second, the library's own patience, is short where two cores do everything: what never comes still fails.
configure({ asyncUtilTimeout: 5000 })

afterEach(cleanup)
