#include "carlin/mounts/ring.hpp"
