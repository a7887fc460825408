export { Frame as default } from '@/components/session/Frame';
