export { LibraryProtocolScreen as default } from '@/components/protocols/LibraryProtocolScreen';
