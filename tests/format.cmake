# Every C++ file is formatted as .clang-format says.
file(GLOB_RECURSE files ${ROOT}/fem/*.h ${ROOT}/fem/*.cpp ${ROOT}/loads/*.h ${ROOT}/loads/*.cpp
     ${ROOT}/models/*.h ${ROOT}/models/*.cpp ${ROOT}/cli/*.h ${ROOT}/cli/*.cpp ${ROOT}/tests/*.h ${ROOT}/tests/*.cpp)
execute_process(COMMAND ${CLANG_FORMAT} --dry-run --Werror ${files} RESULT_VARIABLE result ERROR_VARIABLE text)
if(result)
  message(SEND_ERROR "Not formatted (clang-format -i FILE mends it):\n${text}")
endif()
