#include "carlin/checks/checks.hpp"
