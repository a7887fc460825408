import { t } from '@/shared/messages';

import type { MailPage } from './page';

/** What the words of an account mail are made of; `link` holds a secret and is blanked once sent. */
export interface AccountParams {
  link?: unknown;
  place?: unknown;
  invitedBy?: unknown;
}

const text = (value: unknown): string => (typeof value === 'string' ? value.trim() : '');

/** Only a link of this product goes out; null when there is none, as after blanking. */
export function accountMail(
  kind: 'invitation' | 'passwordReset',
  params: AccountParams,
  publicUrl: string,
): MailPage | null {
  const url = text(params.link);
  if (!url.startsWith(`${publicUrl}/`)) return null;
  if (kind === 'passwordReset') {
    const subject = t('telling.passwordReset.subject');
    return {
      subject,
      heading: subject,
      lead: t('telling.passwordReset.lead'),
      sections: [],
      action: { words: t('telling.passwordReset.action'), url },
      foot: t('telling.passwordReset.foot'),
    };
  }
  const names = {
    place: text(params.place) || t('telling.invitation.somewhere'),
    invitedBy: text(params.invitedBy) || t('telling.invitation.someone'),
  };
  const subject = t('telling.invitation.subject', names);
  return {
    subject,
    heading: subject,
    lead: t('telling.invitation.lead', names),
    sections: [],
    action: { words: t('telling.invitation.action'), url },
    foot: t('telling.invitation.foot'),
  };
}
