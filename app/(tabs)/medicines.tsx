export { MedicinesScreen as default } from '@/components/medicines/MedicinesScreen';
