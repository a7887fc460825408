export { ProtocolsScreen as default } from '@/components/protocols/ProtocolsScreen';
