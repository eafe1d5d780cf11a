#include "carlin/section/shell_section.hpp"
