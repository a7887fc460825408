export { MoreScreen as default } from '@/components/session/MoreScreen';
