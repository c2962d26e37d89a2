import { cleanup, configure } from '@testing-library/react';
import { afterEach, beforeEach, vi } from 'vitest';
import { queryClient } from '../lib/query-client.js';

// A page is compiled when a test first opens it, which takes a busy machine its time.
configure({ asyncUtilTimeout: 15_000 });

beforeEach(() => queryClient.clear());
afterEach(() => {
  cleanup();
  vi.unstubAllGlobals();
});
