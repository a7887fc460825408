export { TaskScreen as default } from '@/components/today/TaskScreen';
