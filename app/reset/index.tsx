export { AskResetScreen as default } from '@/components/session/AskResetScreen';
