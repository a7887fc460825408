export { VersionScreen as default } from '@/components/protocols/VersionScreen';
