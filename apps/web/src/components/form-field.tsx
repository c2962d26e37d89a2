import { chakra, Field, NativeSelect } from '@chakra-ui/react';
import type { ComponentProps, ReactNode } from 'react';

interface FormFieldProps {
  label: string;
  help?: ReactNode;
  /** Message of react-hook-form: `errors.name?.message`. */
  error?: string | undefined;
  /** Marks the field as one that may stay empty. */
  optional?: boolean;
  children: ReactNode;
}

/** A labelled control with its help and its error; the control inside is tied to all three. */
export function FormField({ label, help, error, optional = false, children }: FormFieldProps) {
  return (
    <Field.Root invalid={error !== undefined}>
      <Field.Label>
        {label}
        {optional ? (
          <chakra.span color="inkSoft" fontWeight="400">
            (optional)
          </chakra.span>
        ) : null}
      </Field.Label>
      {children}
      {help ? <Field.HelperText>{help}</Field.HelperText> : null}
      <Field.ErrorText role="alert">{error}</Field.ErrorText>
    </Field.Root>
  );
}

type SelectProps = ComponentProps<typeof NativeSelect.Field> & {
  options: readonly { value: string; label: string }[];
  width?: ComponentProps<typeof NativeSelect.Root>['width'];
  disabled?: boolean;
};

/** A drop-down of the platform; inside a `FormField` it takes its label. */
export function SelectInput({ options, width, disabled = false, ...props }: SelectProps) {
  return (
    <NativeSelect.Root width={width ?? 'full'} disabled={disabled}>
      <NativeSelect.Field {...props}>
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </NativeSelect.Field>
      <NativeSelect.Indicator />
    </NativeSelect.Root>
  );
}
