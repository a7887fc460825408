import { useState } from 'react';
import { StyleSheet, View } from 'react-native';

import { t } from '@/shared/messages';
import { color, space } from '../theme/tokens';
import { Button } from '../ui/Button';
import { Field } from '../ui/Field';
import { Notice } from '../ui/Notice';
import { Text } from '../ui/Text';
import { QrCode } from './QrCode';

/** The secret address, this once: to copy, to scan, to open. */
export function SecretAddress({ label, url, onDone }: { label: string; url: string; onDone: () => void }) {
  const [copied, setCopied] = useState(false);
  const copy = async () => {
    try {
      await navigator.clipboard.writeText(url);
      setCopied(true);
    } catch {
      // a page without TLS may not write to the clipboard: the address stands in the field to be copied by hand
      setCopied(false);
    }
  };
  return (
    <View style={styles.secret}>
      <Text variant="subheading" level={3}>
        {t('links.secretTitle', { label })}
      </Text>
      <Notice tone="warn" title={t('links.secret')}>
        {t('links.secretHow')}
      </Notice>
      <Field label={t('links.address')} value={url} onChange={() => undefined} />
      <View style={styles.acts}>
        <Button kind="primary" label={t('links.copy')} onPress={() => void copy()} />
        <a href={url.replace(/^https?:/, 'webcal:')} style={{ lineHeight: '48px', color: color.ink }}>
          {t('links.open')}
        </a>
      </View>
      <Text role="status" tone="good" strong>
        {copied ? t('ui.copied') : ''}
      </Text>
      <QrCode text={url} label={t('links.qr')} />
      <Button label={t('links.done')} onPress={onDone} />
    </View>
  );
}

const styles = StyleSheet.create({
  secret: { gap: space.m, paddingVertical: space.m, borderTopWidth: 3, borderTopColor: color.ink },
  acts: { flexDirection: 'row', flexWrap: 'wrap', gap: space.m },
});
