import { Screen } from '../ui/Screen';

export const ProtocolScreen = () => <Screen title="Protocol" />;
