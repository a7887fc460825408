import type { VersionDetail } from '@/shared/contracts/protocols';
import { t } from '@/shared/messages';
import { day } from '@/shared/when';

/** What a version is: a working copy after which one, signed off by whom and when, or retired. */
export function versionWords(version: Pick<VersionDetail, 'number' | 'state' | 'signedBy' | 'signedAt'>): string {
  if (version.state === 'workingCopy')
    return version.number > 1
      ? t('protocols.workingCopyAfter', { number: version.number - 1 })
      : t('protocols.workingCopyFirst');
  const signed = t('protocols.signedOffBy', {
    name: version.signedBy ?? '',
    day: day(Date.parse(version.signedAt ?? ''), 'UTC', undefined, true),
  });
  const base = `${t('protocols.version', { number: version.number })}, ${signed}`;
  return version.state === 'retired' ? `${t('protocols.retired')}. ${base}` : base;
}
