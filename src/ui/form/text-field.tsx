import { useId, useState, type ReactNode } from 'react';
import { View, type TextInputProps } from 'react-native';
import { TextInput } from 'react-native-paper';

import { CORNER, SPACE, TOUCH_TARGET, useTokens } from '../theme';
import { Words } from '../words';

interface TextFieldProps {
  label: string;
  value: string;
  onChange: (text: string) => void;
  onBlur?: () => void;
  /** What is wrong with it, and what to do. */
  error?: string;
  hint?: ReactNode;
  unit?: string;
  kind?: 'text' | 'number' | 'email' | 'password';
  lines?: number;
  onSubmit?: () => void;
  autoComplete?: TextInputProps['autoComplete'];
}

const KEYBOARDS = {
  text: 'default',
  number: 'decimal-pad',
  email: 'email-address',
  password: 'default',
} as const;

/** One thing to type: a label that stays, a unit, a hint, and its error right under it. */
export function TextField(props: TextFieldProps) {
  const { label, value, onChange, error, hint, unit, kind = 'text', lines = 1 } = props;
  const tokens = useTokens();
  const id = useId();
  const [isShown, setIsShown] = useState(false);
  const isSecret = kind === 'password';
  const noteId = `${id}-note`;
  // Attributes that the web input understands and the native types do not list.
  const webOnly = {
    'aria-invalid': error ? true : undefined,
    'aria-describedby': error || hint ? noteId : undefined,
  } as object;
  return (
    <View style={{ gap: SPACE.half }}>
      <TextInput
        {...webOnly}
        mode="outlined"
        label={label}
        aria-label={unit ? `${label}, ${unit}` : label}
        value={value}
        onChangeText={onChange}
        onBlur={props.onBlur}
        onSubmitEditing={props.onSubmit}
        submitBehavior={lines > 1 ? 'newline' : 'submit'}
        error={error !== undefined}
        keyboardType={KEYBOARDS[kind]}
        inputMode={kind === 'number' ? 'decimal' : kind === 'email' ? 'email' : 'text'}
        autoCapitalize={kind === 'text' ? 'sentences' : 'none'}
        autoCorrect={kind === 'text' && lines > 1}
        autoComplete={props.autoComplete}
        secureTextEntry={isSecret && !isShown}
        multiline={lines > 1}
        numberOfLines={lines}
        outlineColor={tokens.outline}
        outlineStyle={{ borderRadius: CORNER }}
        style={{ backgroundColor: tokens.surface }}
        contentStyle={kind === 'number' ? { fontVariant: ['tabular-nums'] } : undefined}
        right={
          isSecret ? (
            <TextInput.Icon
              icon={isShown ? 'eyeOff' : 'eye'}
              accessibilityLabel={isShown ? 'Hide the password' : 'Show the password'}
              onPress={() => setIsShown(!isShown)}
              size={24}
              style={{ width: TOUCH_TARGET, height: TOUCH_TARGET, margin: 0 }}
            />
          ) : unit ? (
            <TextInput.Affix text={unit} />
          ) : undefined
        }
      />
      {(error || hint) && (
        <View id={noteId} style={{ paddingHorizontal: SPACE.half }}>
          {error ? (
            <Words size="small" tone="danger" role="alert">
              {error}
            </Words>
          ) : (
            <Words size="small" tone="quiet">
              {hint}
            </Words>
          )}
        </View>
      )}
    </View>
  );
}
