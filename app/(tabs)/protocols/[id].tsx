export { ProtocolScreen as default } from '@/components/protocols/ProtocolScreen';
