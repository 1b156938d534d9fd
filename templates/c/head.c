/*
{{#each lines}}
 * {{line}}
{{/each}}
 */
