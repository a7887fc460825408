import { Screen } from '../ui/Screen';

export const ProtocolsScreen = () => <Screen title="Protocols" />;
