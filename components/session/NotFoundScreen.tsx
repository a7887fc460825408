import { t } from '@/shared/messages';
import { LinkButton } from '../ui/Link';
import { Text } from '../ui/Text';
import { Outside } from './Outside';

export const NotFoundScreen = () => (
  <Outside title={t('nav.notFound')}>
    <Text>{t('nav.notFoundNext')}</Text>
    <LinkButton href="/" kind="primary" label={t('nav.toToday')} />
  </Outside>
);
