export { HerdScreen as default } from '@/components/herd/HerdScreen';
