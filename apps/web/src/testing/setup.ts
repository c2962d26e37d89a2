import { cleanup } from '@testing-library/react';
import { afterEach, beforeEach } from 'vitest';
import { queryClient } from '../lib/query-client.js';

beforeEach(() => queryClient.clear());
afterEach(cleanup);
