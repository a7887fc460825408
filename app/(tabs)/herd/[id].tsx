export { AnimalScreen as default } from '@/components/herd/AnimalScreen';
