#include "carlin/recovery/recovery.hpp"
