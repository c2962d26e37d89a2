import { ChakraProvider } from '@chakra-ui/react';
import { render, screen } from '@testing-library/react';
import userEvent from '@testing-library/user-event';
import { beforeEach, describe, expect, it, vi } from 'vitest';
import { system } from '../lib/theme/system.js';
import { RangeFields, type Range } from './range-fields.js';

const onChange = vi.fn<(range: Range) => void>();

function show() {
  render(
    <ChakraProvider value={system}>
      <RangeFields
        label="Frequencies shown"
        unit="Hz"
        range={{ from: 0, to: 2000 }}
        limits={{ from: 0, to: 5000 }}
        onChange={onChange}
      />
    </ChakraProvider>,
  );
  return { user: userEvent.setup(), to: screen.getByLabelText<HTMLInputElement>('to') };
}

describe('fields of a range', () => {
  beforeEach(() => onChange.mockClear());

  it('take a number with Enter, with a decimal comma too', async () => {
    const { user, to } = show();
    await user.clear(to);
    await user.type(to, '512,5{Enter}');
    expect(onChange).toHaveBeenCalledExactlyOnceWith({ from: 0, to: 512.5 });
  });

  it('mark what lies outside and go back to what was there', async () => {
    const { user, to } = show();
    await user.clear(to);
    await user.type(to, '6000');
    expect(to.getAttribute('aria-invalid')).toBe('true');
    await user.tab();
    expect(to.value).toBe('2000');
    expect(onChange).not.toHaveBeenCalled();
  });
});
