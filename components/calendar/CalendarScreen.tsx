import { Screen } from '../ui/Screen';

export const CalendarScreen = () => <Screen title="Calendar" />;
