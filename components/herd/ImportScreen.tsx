import { Screen } from '../ui/Screen';

export const ImportScreen = () => <Screen title="Import" />;
