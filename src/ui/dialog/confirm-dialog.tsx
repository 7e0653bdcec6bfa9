import { type ReactNode } from 'react';
import { Modal, Pressable, View } from 'react-native';

import { Button } from '../button';
import { CORNER, SPACE, useTokens } from '../theme';
import { Words } from '../words';

interface ConfirmDialogProps {
  title: string;
  /** What will happen, what stays. */
  children: ReactNode;
  verb: string;
  isOpen: boolean;
  isBusy: boolean;
  error?: string;
  onConfirm: () => void;
  onClose: () => void;
}

/** Asks before something that cannot be taken back. Escape and a press beside it close it. */
export function ConfirmDialog(props: ConfirmDialogProps) {
  const { title, children, verb, isOpen, isBusy, error, onConfirm, onClose } = props;
  const tokens = useTokens();
  return (
    <Modal visible={isOpen} transparent animationType="none" onRequestClose={onClose}>
      <View style={{ flex: 1, justifyContent: 'center', alignItems: 'center', padding: SPACE.two }}>
        <Pressable
          aria-hidden
          tabIndex={-1}
          onPress={onClose}
          style={{ position: 'absolute', inset: 0, backgroundColor: 'rgba(8, 16, 20, 0.5)' }}
        />
        <View
          role="dialog"
          aria-label={title}
          style={{
            width: '100%',
            maxWidth: 440,
            padding: SPACE.three,
            gap: SPACE.two,
            borderRadius: CORNER,
            backgroundColor: tokens.surface,
            boxShadow: '0 8px 40px rgba(8, 16, 20, 0.35)',
          }}
        >
          <Words size="title" weight="medium" level={2}>
            {title}
          </Words>
          <Words>{children}</Words>
          {error && (
            <Words tone="danger" role="alert">
              {error}
            </Words>
          )}
          <View
            style={{ flexDirection: 'row', flexWrap: 'wrap', justifyContent: 'flex-end', gap: SPACE.one }}
          >
            <Button onPress={onClose}>Keep it</Button>
            <Button kind="danger" onPress={onConfirm} busy={isBusy}>
              {verb}
            </Button>
          </View>
        </View>
      </View>
    </Modal>
  );
}
