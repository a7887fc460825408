export { SetPasswordScreen as default } from '@/components/session/SetPasswordScreen';
