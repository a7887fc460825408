export { ImportScreen as default } from '@/components/herd/ImportScreen';
